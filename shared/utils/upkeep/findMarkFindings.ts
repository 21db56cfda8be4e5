import type { DangerSign, MarkKind, MarkShape, StainState } from '../../types/mark'
import type { Finding, FindingSubject } from '../../types/finding'
import { addDays, dayNumber, daysBetween } from '../days'
import type { MarkTrend } from '../movement/trend'
import type { SuddenRise } from '../movement/sudden'
import { widthClass } from '../movement/widthClass'
import type { NextReading } from './readingPlan'

export interface JudgedReading {
  takenOn: string
  value: number
  sigma: number
  spanMm?: number | null
  stain?: StainState | null
  dangerSigns?: readonly DangerSign[]
}

export interface MarkJudgement {
  /** A mark counts as new from the day it was reported, however long ago it was first seen. */
  mark: { id: string, kind: MarkKind, shape: MarkShape | null, firstSeenOn: string, reportedOn: string }
  today: string
  /** The newest segment only. */
  readings: readonly JudgedReading[]
  trend: MarkTrend
  /** Signs reported and not yet cleared by somebody's look; readings taken after `dangerClearedOn` count too. */
  dangerSigns: readonly { sign: DangerSign, seenOn: string }[]
  dangerClearedOn: string | null
  /** Stain state from the report; a later reading's goes before it. */
  stain: { state: StainState, seenOn: string } | null
  /** Weight in the attic above and its greatest utilisation; null without an attic or where nothing is rated. */
  loadAbove: { totalLb: number, utilisation: number | null } | null
  /** Width the sag is judged over when a reading names none; null when unknown. */
  ceilingSpanMm: number | null
  plaster: boolean
  /** So many more pops than at the least count are growth: the organisation's limit. */
  morePops: number
  nextReading: NextReading | null
}

/** Common practice for gypsum board and plaster (Gypsum Construction Handbook; IRC R301.7): aim for these, never worse than L/120. */
export const SAG_DIVISORS = { board: 240, plaster: 360, urgent: 120 } as const
/** Ours, all of them. */
const NEW_MARK_DAYS = 90
const SUDDEN_STANDS_DAYS = 30
const LEAST_LOAD_ABOVE_LB = 50
/** So many pops in one row are a line: a danger sign where they appear together. */
const POPS_IN_LINE = 3
const READING_GRACE_DAYS = 7
const CLASS_NEEDS_SIGMAS = 2

interface Judged extends MarkJudgement { subject: FindingSubject, unit: 'mm' | 'pops', inOrder: JudgedReading[] }

function dangerFindings({ subject, dangerSigns, dangerClearedOn, inOrder }: Judged): Finding[] {
  const fromReadings = inOrder.flatMap(reading => (reading.dangerSigns ?? []).map(sign => ({ sign, seenOn: reading.takenOn })))
  const standing = [...dangerSigns, ...fromReadings].filter(({ seenOn }) => dangerClearedOn === null || dayNumber(seenOn) > dayNumber(dangerClearedOn))
  if (standing.length === 0) return []
  const signs = [...new Set(standing.map(({ sign }) => sign))]
  const seenOn = standing.map(entry => entry.seenOn).sort().at(-1)!
  return [{ rule: 'danger-sign', subject, severity: 'urgent', evidence: { signs, seenOn }, adviceCode: 'leave-room-and-call' }]
}

/** A jump stays a finding for a month: the median before it soon grows used to the new level. */
function suddenFindings({ subject, trend, today, unit }: Judged): Finding[] {
  const standsFrom = dayNumber(addDays(today, -SUDDEN_STANDS_DAYS))
  const rise: SuddenRise | undefined = trend.suddenRises.filter(jump => dayNumber(jump.takenOn) >= standsFrom).at(-1) ?? trend.sudden ?? undefined
  if (!rise) return []
  const evidence = { value: rise.value, previous: rise.baseline, rise: rise.rise, threshold: rise.threshold, takenOn: rise.takenOn, unit }
  return [{ rule: 'mark-sudden', subject, severity: 'urgent', evidence, adviceCode: 'leave-room-and-call' }]
}

function activeFindings({ mark, subject, trend, loadAbove, unit }: Judged): Finding[] {
  if (trend.kind !== 'measured' || trend.activity !== 'active' || mark.kind === 'nail-pops') return []
  const { slopePerYear, interval, readingCount, spanDays } = trend
  const growth = { slopePerYear, interval, readingCount, spanDays }
  if (mark.kind === 'sag') return [{ rule: 'sag-growing', subject, severity: 'urgent', evidence: growth, adviceCode: 'unload-then-engineer' }]
  const loaded = (loadAbove?.totalLb ?? 0) >= LEAST_LOAD_ABOVE_LB
  return [{
    rule: 'mark-active', subject, severity: (loadAbove?.utilisation ?? 0) > 1 ? 'urgent' : 'attention',
    evidence: { ...growth, since: trend.activeSince ?? trend.endOn, unit }, adviceCode: loaded ? 'unload-then-engineer' : 'look-then-engineer',
  }]
}

function widthFindings({ mark, subject, inOrder }: Judged): Finding[] {
  const first = inOrder[0]
  const last = inOrder.at(-1)
  if (mark.kind !== 'crack' || !first || !last || first === last) return []
  const fromClass = widthClass(first.value).class
  const toClass = widthClass(last.value).class
  const sure = last.value - first.value > CLASS_NEEDS_SIGMAS * Math.hypot(first.sigma, last.sigma)
  if (toClass <= fromClass || !sure) return []
  const evidence = { fromClass, toClass, widthMm: last.value, takenOn: last.takenOn }
  return [{ rule: 'width-class-up', subject, severity: toClass >= 3 ? 'attention' : 'notice', evidence, adviceCode: 'watch-and-check-above' }]
}

function popFindings({ mark, subject, inOrder, morePops }: Judged): Finding[] {
  const last = inOrder.at(-1)
  if (mark.kind !== 'nail-pops' || !last) return []
  const findings: Finding[] = []
  const least = Math.min(...inOrder.map(reading => reading.value))
  if (last.value - least >= morePops) {
    findings.push({ rule: 'nail-pops-growing', subject, severity: 'attention', evidence: { fromCount: least, toCount: last.value, takenOn: last.takenOn }, adviceCode: 'look-then-engineer' })
  }
  if (mark.shape === 'bumps-in-a-row' && last.value >= POPS_IN_LINE) {
    findings.push({ rule: 'nail-pops-in-line', subject, severity: 'attention', evidence: { count: last.value, takenOn: last.takenOn }, adviceCode: 'look-then-engineer' })
  }
  return findings
}

function sagFindings({ mark, subject, inOrder, ceilingSpanMm, plaster }: Judged): Finding[] {
  const last = inOrder.at(-1)
  const spanMm = last?.spanMm ?? ceilingSpanMm
  if (mark.kind !== 'sag' || !last || spanMm === null || !(spanMm > 0)) return []
  const divisor = plaster ? SAG_DIVISORS.plaster : SAG_DIVISORS.board
  const limitMm = spanMm / divisor
  if (last.value <= limitMm) return []
  const severity = last.value > spanMm / SAG_DIVISORS.urgent ? 'urgent' : 'attention'
  return [{ rule: 'sag-over-limit', subject, severity, evidence: { dropMm: last.value, limitMm, divisor, spanMm, takenOn: last.takenOn }, adviceCode: 'unload-then-engineer' }]
}

function stainFindings({ subject, stain, inOrder }: Judged): Finding[] {
  const read = inOrder.filter(reading => reading.stain !== null && reading.stain !== undefined).at(-1)
  const seen = read && (!stain || dayNumber(read.takenOn) >= dayNumber(stain.seenOn)) ? { state: read.stain!, seenOn: read.takenOn } : stain
  if (!seen || (seen.state !== 'damp' && seen.state !== 'dripping')) return []
  const dripping = seen.state === 'dripping'
  return [{
    rule: 'stain-wet', subject, severity: dripping ? 'urgent' : 'attention',
    evidence: { state: seen.state, seenOn: seen.seenOn }, adviceCode: dripping ? 'leave-room-and-call' : 'find-the-leak',
  }]
}

/** A new mark stands until a reading of a later day exists; under a load it stands for its whole first quarter. */
function newMarkFindings({ mark, subject, loadAbove, today, inOrder }: Judged): Finding[] {
  if (daysBetween(mark.reportedOn, today) > NEW_MARK_DAYS) return []
  if (!loadAbove || loadAbove.totalLb < LEAST_LOAD_ABOVE_LB) {
    if (inOrder[0]?.takenOn !== inOrder.at(-1)?.takenOn) return []
    return [{ rule: 'new-mark', subject, severity: 'notice', evidence: { firstSeenOn: mark.firstSeenOn }, adviceCode: 'watch-and-check-above' }]
  }
  const over = (loadAbove.utilisation ?? 0) > 1
  return [{
    rule: 'new-mark-under-load', subject, severity: over ? 'urgent' : 'attention',
    evidence: { ...loadAbove, firstSeenOn: mark.firstSeenOn }, adviceCode: over ? 'unload-then-engineer' : 'watch-and-check-above',
  }]
}

function readingFindings({ subject, nextReading }: Judged): Finding[] {
  if (!nextReading || nextReading.daysLate <= READING_GRACE_DAYS) return []
  const graver = nextReading.priority === 'raised' || nextReading.reason === 'active-weekly'
  return [{ rule: 'reading-overdue', subject, severity: graver ? 'attention' : 'notice', evidence: { dueOn: nextReading.dueOn, daysLate: nextReading.daysLate }, adviceCode: 'take-reading' }]
}

/** What stands to be said about a mark today. */
export function findMarkFindings(judgement: MarkJudgement): Finding[] {
  const inOrder = [...judgement.readings].sort((a, b) => dayNumber(a.takenOn) - dayNumber(b.takenOn))
  const judged: Judged = {
    ...judgement, inOrder, subject: { kind: 'mark', id: judgement.mark.id }, unit: judgement.mark.kind === 'nail-pops' ? 'pops' : 'mm',
  }
  return [
    ...dangerFindings(judged), ...suddenFindings(judged), ...activeFindings(judged), ...widthFindings(judged), ...popFindings(judged),
    ...sagFindings(judged), ...stainFindings(judged), ...newMarkFindings(judged), ...readingFindings(judged),
  ]
}
