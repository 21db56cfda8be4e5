import type { ColumnType, Generated, JSONColumnType } from 'kysely'
import type { PeopleTables } from './schema/people'
import type { HomeTables } from './schema/homes'
import type { AtticTables } from './schema/attics'
import type { CeilingTables } from './schema/ceilings'
import type { UpkeepTables } from './schema/upkeep'
import type { RecordTables } from './schema/record'
import type { NoticeTables } from './schema/notices'
import type { TrialTables } from './schema/trials'

/** Instants travel as ISO strings, days as 'YYYY-MM-DD'; connect.ts sets the parsers. */
export type Instant = ColumnType<string, string, string>
export type Day = ColumnType<string, string, string>
export type Json<T extends object> = JSONColumnType<T>
export type Defaulted<T> = Generated<T>

export interface Database extends PeopleTables, HomeTables, AtticTables, CeilingTables, UpkeepTables, RecordTables, TrialTables, NoticeTables {}
