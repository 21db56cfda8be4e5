import { keptPage } from '../utils/keptPages'

const NOT_PAGES = /^\/(?:api|_nuxt|_ipx|__|photos)\b|\.[a-z\d]+(?:\?|$)/

/** A page that was made before for the same person, from the same state, is not rendered again. */
export default defineEventHandler((event) => {
  if (event.method !== 'GET' || NOT_PAGES.test(event.path)) return
  if (!(getHeader(event, 'accept') ?? '*/*').match(/text\/html|\*\/\*/)) return
  return keptPage(event)
})
