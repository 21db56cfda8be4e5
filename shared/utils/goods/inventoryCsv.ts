import type { ItemOwner, StoredItem, WeightSource } from '../../types/item'
import type { ListProblem } from '../../types/inventoryList'
import { ftToM, kgToLb, lbToKg, mToFt, type UnitSystem } from '../units'
import { weightByGuess } from './goodsDensities'

/** Our own columns of an attic's list. A measure says its unit in the column's name, so that no number is taken for another. */
const LENGTHS = { from_wall: 'xFt', across: 'yFt', length: 'lengthFt', width: 'widthFt', height: 'heightFt' } as const
const WEIGHTS = { low: 'lowLb', weight: 'typicalLb', high: 'highLb' } as const
const WORDS = { name: 'name', pieces: 'quantity', weight_source: 'weightSource', whose: 'belongsTo', joists: 'fieldNumber', there_since: 'placedOn', catalogue: 'catalogueKey', category: 'category', kept_despite: 'keptDespite', notes: 'notes' } as const

const TO_FT: Record<string, number> = { ft: 1, in: 1 / 12, m: mToFt(1), cm: mToFt(0.01) }
const TO_LB: Record<string, number> = { lb: 1, kg: kgToLb(1) }

export type ListItem = Pick<StoredItem, typeof LENGTHS[keyof typeof LENGTHS] | typeof WEIGHTS[keyof typeof WEIGHTS] | typeof WORDS[keyof typeof WORDS]>

const COLUMN_ORDER = ['name', 'pieces', 'weight', 'low', 'high', 'weight_source', 'whose', 'joists', 'from_wall', 'across', 'length', 'width', 'height', 'there_since', 'catalogue', 'category', 'kept_despite', 'notes'] as const

/** Spreadsheets run what begins like this as a formula; an apostrophe before it keeps it text, and reading takes one off again. */
const FORMULA = /^'*[=+\-@\t\r]/
const guard = (text: string) => FORMULA.test(text) ? `'${text}` : text
const unguard = (text: string) => text.startsWith('\'') && FORMULA.test(text) ? text.slice(1) : text

const unitOf = (column: string, system: UnitSystem) =>
  column in LENGTHS ? (system === 'us' ? 'ft' : 'm') : column in WEIGHTS ? (system === 'us' ? 'lb' : 'kg') : null

export const listHeader = (system: UnitSystem): string[] =>
  COLUMN_ORDER.map(column => unitOf(column, system) ? `${column}_${unitOf(column, system)}` : column)

/** One item as cells of a list in the order of the header. US measures read back exactly, metric ones to twelve digits. */
export function listCells(item: ListItem, system: UnitSystem): string[] {
  const number = (value: number | null, toMetric: (value: number) => number) =>
    value === null ? '' : system === 'us' ? String(value) : String(Number(toMetric(value).toPrecision(12)))
  return COLUMN_ORDER.map((column) => {
    if (column in LENGTHS) return number(item[LENGTHS[column as keyof typeof LENGTHS]], ftToM)
    if (column in WEIGHTS) return number(item[WEIGHTS[column as keyof typeof WEIGHTS]], lbToKg)
    return guard(String(item[WORDS[column as keyof typeof WORDS]] ?? ''))
  })
}

type Reader = (cell: string, item: Partial<Record<keyof ListItem, unknown>>) => string | undefined

/** How to read a column, by its name; undefined for one nobody knows, a sentence for a measure without its unit. */
export function columnReader(column: string): Reader | string | undefined {
  const name = column.trim().toLowerCase().replace(/[\s-]+/g, '_')
  if (name in WORDS) return wordReader(WORDS[name as keyof typeof WORDS])
  const [, measure = '', unit = ''] = /^(.+?)(?:_([a-z]+))?$/.exec(name) ?? []
  if (name in LENGTHS || name in WEIGHTS) return `Write the unit into the column’s name, such as ${name}_${name in LENGTHS ? 'ft or '.concat(name, '_m') : 'lb or '.concat(name, '_kg')}.`
  if (measure in LENGTHS && unit in TO_FT) return measureReader(LENGTHS[measure as keyof typeof LENGTHS], TO_FT[unit]!)
  if (measure in WEIGHTS && unit in TO_LB) return measureReader(WEIGHTS[measure as keyof typeof WEIGHTS], TO_LB[unit]!)
  return undefined
}

const NUMBER = /^-?\d+(\.\d+)?(e[-+]?\d+)?$/i

const measureReader = (key: keyof ListItem, factor: number): Reader => (cell, item) => {
  if (cell === '') return undefined
  if (!NUMBER.test(cell)) return `“${cell}” is no number. Write it with a point, such as 12.5, and without the unit.`
  item[key] = Number(cell) * factor
  return undefined
}

const wordReader = (key: keyof ListItem): Reader => (cell, item) => {
  const text = unguard(cell)
  if (text === '') return undefined
  if (key === 'quantity' || key === 'fieldNumber') {
    if (!/^\d+$/.test(text)) return `“${text}” is no whole number.`
    item[key] = Number(text)
    return undefined
  }
  if (key === 'belongsTo' && !OWNERS.has(text)) return 'Write landlord or tenant.'
  if (key === 'weightSource' && !SOURCES.has(text)) return 'Write weighed, estimate or catalogue.'
  item[key] = text
  return undefined
}
const OWNERS: ReadonlySet<string> = new Set<ItemOwner>(['landlord', 'tenant'])
const SOURCES: ReadonlySet<string> = new Set<WeightSource>(['weighed', 'estimate', 'catalogue'])

/** The column a field of the item is read from, for telling what is wrong. */
export const columnOf = (key: string): string =>
  [...Object.entries(LENGTHS), ...Object.entries(WEIGHTS), ...Object.entries(WORDS)].find(([, field]) => field === key)?.[0] ?? key

export interface ReadRow { item: Partial<Record<keyof ListItem, unknown>>, problems: ListProblem[] }

/** A row with the defaults filled in. A weight without low and high counts as a guess, unless it was weighed. */
export function readListRow(cells: readonly { column: string, read: Reader, cell: string }[], today: string): ReadRow {
  const item: ReadRow['item'] = {
    quantity: 1, weightSource: 'estimate', belongsTo: 'landlord', fieldNumber: 1, xFt: 0, yFt: 0, heightFt: null, placedOn: today, catalogueKey: null, category: 'other', keptDespite: '', notes: '',
  }
  const problems: ListProblem[] = []
  for (const { column, read, cell } of cells) {
    const message = read(cell.trim(), item)
    if (message) problems.push({ column, message })
  }
  const { lowLb, highLb, typicalLb } = item
  if (typeof typicalLb === 'number' && typicalLb > 0 && lowLb === undefined && highLb === undefined) {
    if (item.weightSource === 'weighed') Object.assign(item, { lowLb: typicalLb, highLb: typicalLb })
    else Object.assign(item, weightByGuess(typicalLb))
  }
  return { item, problems }
}
