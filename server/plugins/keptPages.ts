import { keepPage } from '../utils/keptPages'

export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('render:response', (response, { event }) => keepPage(event, response))
})
