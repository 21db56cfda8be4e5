import { parse } from 'csv-parse/sync'
import { stringify } from 'csv-stringify/sync'
import type { AtticSurvey } from '../../shared/types/attic'
import type { ListPreview, ListProblem, ListRow } from '../../shared/types/inventoryList'
import { AtticItemInput, type AtticItemValue } from '../../shared/schemas/atticItem'
import { columnOf, columnReader, listCells, listHeader, readListRow, type ListItem } from '../../shared/utils/goods/inventoryCsv'
import type { UnitSystem } from '../../shared/utils/units'
import { keptDespiteProblem } from '../../shared/utils/goods/refusals'
import { outsideField } from '../../shared/utils/structure/outsideField'
import { unsound } from './problems'

/** Ours: what one person can look through before it is read in. */
export const MOST_LIST_ROWS = 500

export const writeInventoryList = (items: readonly ListItem[], system: UnitSystem): string =>
  stringify([listHeader(system), ...items.map(item => listCells(item, system))], { record_delimiter: '\r\n' })

export interface ReadList extends ListPreview { items: AtticItemValue[] }

/** A list as it came, row by row: what would be stored, and what is wrong where. Throws a coded problem when it is no list at all. */
export function readInventoryList(csv: string, { survey, today }: { survey: AtticSurvey | null, today: string }): ReadList {
  const [header, ...records] = parseCells(csv)
  if (!header || records.length === 0) throw unsound({ csv: 'There is no row under the header.' })
  if (records.length > MOST_LIST_ROWS) throw unsound({ csv: `At most ${MOST_LIST_ROWS} rows at a time. Split the list.` })
  const columns = header.record.map(column => ({ column: column.trim(), read: columnReader(column) }))
  const unitless = columns.find(({ read }) => typeof read === 'string')
  if (unitless) throw unsound({ csv: `Column ${unitless.column}: ${String(unitless.read)}` })
  const names = columns.filter(({ read }) => read).map(({ column }) => column.toLowerCase())
  if (new Set(names).size < names.length) throw unsound({ csv: 'A column stands there twice.' })
  if (!names.includes('name')) throw unsound({ csv: 'There is no column called name. The first row has to name the columns.' })
  const rows = records.map(({ record, info }) => readRow({ record, line: info.lines, columns }, { survey, today }))
  const good = rows.filter(row => row.problems.length === 0)
  return {
    rows: rows.map(({ line, value, problems }): ListRow => ({ line, problems, item: value && { name: value.name, quantity: value.quantity, weightSource: value.weightSource, lowLb: value.lowLb, typicalLb: value.typicalLb, highLb: value.highLb } })),
    items: good.map(row => row.value!), good: good.length, bad: rows.length - good.length,
    totalLb: good.reduce((sum, { value }) => sum + value!.quantity * value!.typicalLb, 0),
    ignoredColumns: columns.filter(({ read, column }) => !read && column !== '').map(({ column }) => column),
  }
}

interface Cells { record: string[], info: { lines: number } }

/** Comma, semicolon or tab, whichever the header has most of. */
function parseCells(csv: string): Cells[] {
  const first = csv.slice(0, csv.search(/[\r\n]|$/))
  const delimiter = [',', ';', '\t'].reduce((best, mark) => first.split(mark).length > first.split(best).length ? mark : best)
  try {
    return parse(csv, { bom: true, delimiter, info: true, relax_column_count: true, skip_empty_lines: true, skip_records_with_empty_values: true }) as unknown as Cells[]
  }
  catch (error) {
    throw unsound({ csv: `The file could not be read as CSV: ${(error as Error).message}` })
  }
}

interface Column { column: string, read: ReturnType<typeof columnReader> }

function readRow({ record, line, columns }: { record: string[], line: number, columns: Column[] }, { survey, today }: { survey: AtticSurvey | null, today: string }) {
  const cells = columns.flatMap(({ column, read }, index) => typeof read === 'function' ? [{ column, read, cell: record[index] ?? '' }] : [])
  const { item, problems } = readListRow(cells, today)
  if (record.length > columns.length) problems.push({ column: '', message: 'This row has more cells than the header has columns.' })
  const parsed = AtticItemInput.safeParse(item)
  // Without a weight there is no range to speak of.
  const issues = parsed.error?.issues.filter(({ path }) => item.typicalLb !== undefined || !['lowLb', 'highLb'].includes(String(path[0]))) ?? []
  if (!parsed.success) problems.push(...newProblems(issues.map(({ path, message }) => ({ column: columnOf(String(path[0] ?? '')), message })), problems))
  else problems.push(...soundProblems(parsed.data, survey, today))
  return { line, problems, value: parsed.success && problems.length === 0 ? parsed.data : null }
}

/** A cell that could not be read says so once. */
const newProblems = (found: ListProblem[], known: ListProblem[]) =>
  found.filter(({ column }) => !known.some(problem => problem.column.toLowerCase().startsWith(column)))

function soundProblems(value: AtticItemValue, survey: AtticSurvey | null, today: string): ListProblem[] {
  const fields = { ...outsideField(survey, value), ...value.placedOn > today ? { placedOn: 'That day has not come yet.' } : {}, ...keptDespiteProblem(value) }
  return Object.entries(fields).map(([key, message]) => ({ column: columnOf(key), message }))
}
