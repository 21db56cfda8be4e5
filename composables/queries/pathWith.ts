/** An address with the parameters that have a value. */
export function pathWith(path: string, parameters: Record<string, string | undefined>): string {
  const given = Object.entries(parameters).filter((entry): entry is [string, string] => Boolean(entry[1]))
  return given.length === 0 ? path : `${path}?${new URLSearchParams(given).toString()}`
}
