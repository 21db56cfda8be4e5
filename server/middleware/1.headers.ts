import { randomUUID } from 'node:crypto'

/** Request id and the headers every answer carries; the content policy of pages is in plugins/contentPolicy.ts. */
export default defineEventHandler((event) => {
  event.context.requestId = randomUUID()
  setResponseHeaders(event, {
    'x-request-id': event.context.requestId,
    'x-content-type-options': 'nosniff',
    'x-frame-options': 'DENY',
    'referrer-policy': 'same-origin',
    'cross-origin-opener-policy': 'same-origin',
    'cross-origin-resource-policy': 'same-origin',
    'permissions-policy': 'camera=(self), geolocation=(), microphone=()',
  })
  if (event.path.startsWith('/api/')) setResponseHeader(event, 'cache-control', 'no-store')
})
