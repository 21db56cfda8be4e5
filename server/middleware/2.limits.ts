import { problem } from '../utils/problems'

const KIB = 1024
const JSON_LIMIT = 256 * KIB
/** 20 MB for the file and some room for the form around it. */
const UPLOAD_LIMIT = 20 * 1000 * 1000 + 64 * KIB
const UPLOADS = /^\/api\/(units\/[^/]+\/photos|attics\/[^/]+\/documents)$/

/** Unsafe methods: same origin only, a known length, and not too long. Node holds a body to its stated length. */
export default defineEventHandler((event) => {
  if (['GET', 'HEAD', 'OPTIONS'].includes(event.method)) return
  const origin = getHeader(event, 'origin')
  if (!origin || hostOf(origin) !== getRequestHost(event, { xForwardedHost: process.env.TRUST_PROXY === '1' })) {
    throw problem(403, 'other-origin', 'This request came from another site.')
  }
  const stated = getHeader(event, 'content-length')
  if (getHeader(event, 'transfer-encoding')) throw problem(411, 'length-required', 'The length of the request must be stated.')
  const limit = UPLOADS.test(event.path.split('?')[0]!) ? UPLOAD_LIMIT : JSON_LIMIT
  if (Number(stated ?? 0) > limit) {
    setResponseHeader(event, 'connection', 'close')
    throw problem(413, 'too-large', limit === UPLOAD_LIMIT ? 'A file may be at most 20 MB.' : 'That is more than this address takes.')
  }
})

function hostOf(origin: string) {
  try { return new URL(origin).host }
  catch { return undefined }
}
