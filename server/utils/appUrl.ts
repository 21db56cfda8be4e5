/** Where people reach this program from outside: APP_URL, without a slash at its end; with a path, the whole address. */
export function appUrl(path = ''): string {
  const base = process.env.APP_URL || `http://127.0.0.1:${process.env.PORT ?? 3000}`
  return base.replace(/\/+$/, '') + path
}
