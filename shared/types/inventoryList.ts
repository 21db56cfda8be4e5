import type { ItemWeightRange } from './item'

export interface ListProblem { column: string, message: string }

/** A row of a list as it would be stored, or what is wrong with it. `line` counts from 1, the header being line 1. */
export interface ListRow {
  line: number
  item: (ItemWeightRange & { name: string, quantity: number }) | null
  problems: ListProblem[]
}

/** What reading a list in would do; nothing is stored yet. */
export interface ListPreview {
  rows: ListRow[]
  good: number
  bad: number
  /** Of the whole list, pieces counted. */
  totalLb: number
  /** Columns nobody knows here; they are not read. */
  ignoredColumns: string[]
}

export interface ListImported { items: number, skipped: number }
