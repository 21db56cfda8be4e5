import { readFileSync } from 'node:fs'

/** Rows of a published table in tests/reference/data, by column name. Quoted cells may hold commas. */
export function publishedTable(name: string): Record<string, string>[] {
  const text = readFileSync(new URL(`../data/${name}`, import.meta.url), 'utf8')
  const [header, ...rows] = text.trim().split(/\r?\n/).map(line =>
    [...line.matchAll(/("([^"]*)"|[^,]*)(,|$)/g)].map(cell => cell[2] ?? cell[1] ?? ''))
  return rows.map(cells => Object.fromEntries((header ?? []).map((column, index) => [column, cells[index] ?? ''])))
}
