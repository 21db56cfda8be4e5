/** Rows fetched with one more than asked → a page and the cursor of the next (schemas/fields.ts reads it back). */
export function asPage<T>(rows: T[], limit: number, keyOf: (row: T) => object): { rows: T[], next: string | null } {
  const page = rows.slice(0, limit)
  const last = page.at(-1)
  return { rows: page, next: rows.length > limit && last ? Buffer.from(JSON.stringify(keyOf(last))).toString('base64url') : null }
}
