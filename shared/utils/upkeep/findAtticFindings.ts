import type { Finding, FindingSubject } from '../../types/finding'
import type { AtticItem } from '../../types/item'
import { dayNumber, daysBetween } from '../days'
import { pressurePsf } from '../goods/footprint'
import { chanceOfExceeding, inventoryTotal, type InventoryTotal } from '../goods/inventoryTotal'
import { refusalsFor } from '../goods/refusals'
import { inspectionDueOn, inventoryDueOn } from './cadence'

/** The part of a rating the rules look at. */
export interface JudgedRating { ratedPsf: number, hold: boolean, basis: string, reasons: readonly { code: string }[] }

/** The part of a load plan's verdict the rules look at, for all fields of the attic together. */
export interface JudgedLoad {
  totalLb: number
  /** Null while a field is not measured: the measured part alone would be taken for the whole. */
  ratedTotalLb: number | null
  joists: readonly { fieldId: string, joistNumber: number, utilisation: number }[]
  /** Items whose weight over footprint exceeds the rating in the middle half of the span. */
  heavyInMiddle: readonly string[]
}

export interface AtticJudgement {
  atticId: string
  today: string
  /** Null until a survey has been made. */
  rating: JudgedRating | null
  /** Null while no plan can be drawn, because joists are not measured or nothing is rated. */
  load: JudgedLoad | null
  /** Rated total where no load plan exists: rated psf over the floor area; null when the area is unknown. */
  ratedTotalLb: number | null
  /** Items up there now. */
  items: readonly AtticItem[]
  /** Ids of items entered where the survey has no joists: they cannot be judged there. */
  outside?: readonly string[]
  confirmedOn: string | null
  inspectedOn: string | null
}

/** Ours: within below 80 %, near to 100 %, over above. */
export const NEAR_SHARE = 0.8
/** Ours. */
export const CHANCE_LIMIT = 0.1

interface Weighed extends AtticJudgement { subject: FindingSubject, total: InventoryTotal }

/** Contents where nothing may be stored: the graver reason goes first and stands alone. */
function storageFindings({ subject, rating, total }: Weighed): Finding[] {
  const loads = { totalLb: total.typicalLb, itemCount: total.itemCount }
  if (!rating) return [{ rule: 'contents-without-survey', subject, severity: 'attention', evidence: loads, adviceCode: 'survey-attic' }]
  if (rating.hold) {
    const holdReasons = rating.reasons.map(reason => reason.code)
    return [{ rule: 'contents-under-hold', subject, severity: 'urgent', evidence: { totalLb: total.typicalLb, holdReasons }, adviceCode: 'keep-empty-until-inspected' }]
  }
  if (rating.ratedPsf > 0) return []
  return [{ rule: 'contents-without-storage', subject, severity: 'attention', evidence: { ...loads, basis: rating.basis }, adviceCode: 'empty-attic' }]
}

/** Total against the rating: over, near, or near only because the total is uncertain. */
function totalFindings({ subject, rating, load, ratedTotalLb, total }: Weighed): Finding[] {
  const ratedLb = load?.ratedTotalLb ?? ratedTotalLb
  if (!rating || rating.hold || rating.ratedPsf <= 0 || ratedLb === null || ratedLb <= 0) return []
  const utilisation = total.typicalLb / ratedLb
  const chance = chanceOfExceeding(total, ratedLb)
  if (utilisation >= NEAR_SHARE) {
    const over = utilisation > 1
    return [{
      rule: 'attic-load', subject, severity: over ? 'urgent' : 'attention', adviceCode: over ? 'stop-adding-and-unload' : 'stop-adding',
      evidence: { state: over ? 'over' : 'near', totalLb: total.typicalLb, ratedTotalLb: ratedLb, ratedPsf: rating.ratedPsf, utilisation, chanceOfExceeding: chance },
    }]
  }
  if (chance <= CHANCE_LIMIT) return []
  return [{
    rule: 'attic-may-exceed', subject, severity: 'notice', adviceCode: 'weigh-or-count',
    evidence: { totalLb: total.typicalLb, highLb: total.highLb, ratedTotalLb: ratedLb, chanceOfExceeding: chance },
  }]
}

function planFindings({ subject, rating, load, items }: Weighed): Finding[] {
  if (!rating || !load || rating.hold || rating.ratedPsf <= 0) return []
  const findings: Finding[] = []
  const over = load.joists.filter(joist => joist.utilisation > 1).sort((a, b) => b.utilisation - a.utilisation)
  const worst = over[0]
  if (worst) {
    const { fieldId, joistNumber, utilisation } = worst
    findings.push({ rule: 'joist-over', subject, severity: 'urgent', evidence: { fieldId, joistNumber, utilisation, joistsOver: over.length }, adviceCode: 'stop-adding-and-unload' })
  }
  const heavy = items.filter(item => load.heavyInMiddle.includes(item.id))
    .map(item => ({ item, psf: pressurePsf(item.count * item.typicalLb, item.lengthFt, item.widthFt) }))
    .sort((a, b) => b.psf - a.psf)
  const heaviest = heavy[0]
  if (heaviest) {
    const evidence = { itemId: heaviest.item.id, label: heaviest.item.label, pressurePsf: heaviest.psf, ratedPsf: rating.ratedPsf, itemCount: heavy.length }
    findings.push({ rule: 'heavy-item-in-middle', subject, severity: 'attention', evidence, adviceCode: 'move-to-bearing-walls' })
  }
  return findings
}

function outsideFindings({ subject, items, outside = [] }: Weighed): Finding[] {
  const strayed = items.filter(item => outside.includes(item.id))
  const first = strayed[0]
  if (!first) return []
  return [{ rule: 'item-outside-joists', subject, severity: 'attention', evidence: { itemId: first.id, label: first.label, itemCount: strayed.length }, adviceCode: 'mend-place' }]
}

function refusedFindings({ subject, items }: Weighed): Finding[] {
  const refused = items.flatMap(item => refusalsFor(item, null)
    .filter(refusal => refusal.level === 'refuse').map(({ reason }) => ({ item, reason })))
  const first = refused[0]
  if (!first) return []
  const evidence = { itemId: first.item.id, label: first.item.label, reason: first.reason, itemCount: refused.length }
  return [{ rule: 'refused-item', subject, severity: 'attention', evidence, adviceCode: 'take-out' }]
}

function staleFindings({ subject, items, confirmedOn, today }: Weighed): Finding[] {
  const since = confirmedOn ?? items.map(item => item.addedOn).sort()[0]!
  const dueOn = inventoryDueOn(since)
  if (dayNumber(dueOn) >= dayNumber(today)) return []
  return [{ rule: 'inventory-stale', subject, severity: 'notice', evidence: { confirmedOn, dueOn }, adviceCode: 'confirm-inventory' }]
}

function inspectionFindings({ atticId, inspectedOn, items, today }: AtticJudgement): Finding[] {
  if (inspectedOn === null) return []
  const dueOn = inspectionDueOn(inspectedOn, items.length > 0)
  const daysLate = daysBetween(dueOn, today)
  if (daysLate <= 0) return []
  return [{ rule: 'inspection-overdue', subject: { kind: 'attic', id: atticId }, severity: 'notice', evidence: { dueOn, daysLate }, adviceCode: 'inspect' }]
}

/** What stands to be said about an attic today. An empty attic can only be late for its inspection. */
export function findAtticFindings(attic: AtticJudgement): Finding[] {
  const inspection = inspectionFindings(attic)
  if (attic.items.length === 0) return inspection
  const weighed: Weighed = { ...attic, subject: { kind: 'attic', id: attic.atticId }, total: inventoryTotal(attic.items) }
  return [
    ...storageFindings(weighed), ...totalFindings(weighed), ...planFindings(weighed), ...outsideFindings(weighed),
    ...refusedFindings(weighed), ...staleFindings(weighed), ...inspection,
  ]
}
