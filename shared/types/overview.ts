import type { Finding, Severity } from './finding'
import type { SectionParts } from './home'
import type { Activity } from './mark'
import type { DueKind } from '../utils/upkeep/dueItems'

export interface OverviewDecision {
  unitId: string
  unitName: string
  propertyName: string
  severity: Severity
  openFindings: number
  finding: Finding & { id: string, openedAt: string }
  parts: SectionParts
}

export type AtticCounts = Record<'within' | 'near' | 'over' | 'hold' | 'unsurveyed', number>

export interface OverviewDue { kind: DueKind, subjectId: string, unitId: string, unitName: string, propertyName: string, dueOn: string }
export interface OverviewChange { unitId: string, unitName: string, propertyName: string, actions: { action: string, count: number }[], lastAt: string }

/** What GET /api/overview answers. */
export interface Overview {
  today: string
  homes: number
  attics: AtticCounts
  marks: Record<Activity, number>
  late: { readings: number, jobs: number }
  spentThisYearCents: number
  needDecision: number
  decisions: OverviewDecision[]
  since: string | null
  changes: OverviewChange[]
  upcoming: OverviewDue[]
}
