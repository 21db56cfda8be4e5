const OUR_ORIGIN = 'http://lathkey.example'

/** The page to open after signing in: a path of ours, or '/' for anything that could lead elsewhere or round in a circle. */
export function safeNext(next: unknown): string {
  if (typeof next !== 'string' || !next.startsWith('/') || next.length > 500) return '/'
  let url: URL
  try { url = new URL(next, OUR_ORIGIN) }
  catch { return '/' }
  if (url.origin !== OUR_ORIGIN || url.pathname.startsWith('//') || url.pathname.startsWith('/api/') || url.pathname === '/sign-in') return '/'
  return url.pathname + url.search + url.hash
}
