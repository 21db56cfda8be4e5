import { closeDb } from '../utils/useDb'

/** The pool ends with the server. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('close', closeDb)
})
