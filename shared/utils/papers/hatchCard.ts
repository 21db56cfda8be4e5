import type { AtticSurvey } from '../../types/attic'
import type { JudgedContents, JudgedField } from '../../types/contents'
import type { HatchCardFacts, HatchCardField, HatchCardRow } from '../../types/paper'
import { distanceFromWall } from '../structure/distanceFromWall'
import { ftToM, kgToLb, mToFt, type UnitSystem } from '../units'

/** A common moving box, ours: in the middle half it may weigh what the rating allows on this square, so larger ones are safe too. */
const BOX_SIDE = { us: 1.5, metric: mToFt(0.45) } as const
/** No single box above this goes up unasked, however strong the joists; ours. */
const ASK_FIRST_LB = { us: 200, metric: kgToLb(90) } as const
/** Weights are printed rounded down to whole steps; ours. */
const STEP_LB = { us: 5, metric: kgToLb(2) } as const
/** More rows than this could not be read at arm's length; ours. */
const MOST_ROWS = 7

interface CardInput { survey: AtticSurvey | null, contents: JudgedContents }

/** What a hatch card must say for an attic as it stands. Trusses and unknown framing get no figure for a box by any path. */
export function hatchCardFacts({ survey, contents }: CardInput, system: UnitSystem = 'us'): HatchCardFacts {
  const { rating, state } = contents
  const ratedPsf = rating?.ratedPsf ?? null
  const mayStore = rating !== null && !rating.hold && rating.ratedPsf > 0 && state !== 'over'
  return {
    state, mayStore, ratedPsf, basis: rating?.basis ?? null, isTrussed: survey?.framing === 'trusses',
    reasons: rating?.reasons ?? [], cautions: rating?.cautions ?? [],
    fields: contents.fields.flatMap(field => cardField(field, mayStore, system) ?? []),
    unmeasuredFields: contents.fields.filter(field => field.answer.kind === 'measures-missing').map(field => field.name),
    storedLb: contents.totalLb, itemCount: contents.itemCount, surveyedOn: survey?.surveyedOn ?? null, boxSideFt: BOX_SIDE[system],
  }
}

function cardField({ number, name, answer, plan }: JudgedField, mayStore: boolean, system: UnitSystem): HatchCardField | null {
  if (answer.kind !== 'field') return null
  const { field, member, memberAssumed } = answer
  const acrossFt = (field.joistCount - 1) * field.spacingIn / 12
  const toFt = distancesFor(field.spanFt, system)
  const table = mayStore ? distanceFromWall(field, memberAssumed ? undefined : member, [0, ...toFt]) : null
  return {
    number, name, spanFt: field.spanFt, acrossFt, joistCount: field.joistCount, ratedTotalLb: plan?.kind === 'judged' ? plan.ratedTotalLb : 0,
    rows: table?.kind === 'table' ? toFt.map((distance, index) => cardRow(distance, [table.rows[index]!.weightLb, table.rows[index + 1]!.weightLb], field, system)) : null,
  }
}

/** Whole feet, or half metres, out to the middle of the span; wider steps where that would be too many rows. */
function distancesFor(spanFt: number, system: UnitSystem): number[] {
  const middle = system === 'us' ? spanFt / 2 : ftToM(spanFt / 2)
  const finest = system === 'us' ? 1 : 0.5
  const step = finest * Math.max(1, Math.ceil(middle / finest / MOST_ROWS))
  const steps = Array.from({ length: Math.max(0, Math.ceil(middle / step - 1e-9) - 1) }, (_, index) => (index + 1) * step)
  return [...steps, middle].map(distance => system === 'us' ? distance : mToFt(distance))
}

/**
 * Each of the four limits falls or rises steadily with the distance, so the least over a stretch is at one of its ends.
 * A real box spreads its weight and bends a joist less than the point that is reckoned with here.
 */
function cardRow(toFt: number, endsLb: readonly [number, number], { spanFt, ratedPsf }: { spanFt: number, ratedPsf: number }, system: UnitSystem): HatchCardRow {
  const side = BOX_SIDE[system]
  const limits: [HatchCardRow['decidedBy'], number][] = [['joist', Math.min(...endsLb)], ['ask-first', ASK_FIRST_LB[system]]]
  if (toFt + side / 2 > spanFt / 4) limits.push(['middle', ratedPsf * side * side])
  const [decidedBy, weightLb] = limits.reduce((least, limit) => limit[1] < least[1] ? limit : least)
  return { toFt, weightLb: Math.floor(weightLb / STEP_LB[system] + 1e-9) * STEP_LB[system], decidedBy }
}

/** The strictest row at each distance over several fields, for a card that has no room for each. */
export function strictestRows(fields: readonly HatchCardField[]): HatchCardRow[] {
  const [shortest] = fields.filter(field => field.rows).sort((a, b) => a.spanFt - b.spanFt)
  return (shortest?.rows ?? []).map(row => fields
    .flatMap(field => field.rows?.find(other => other.toFt >= row.toFt - 1e-9) ?? field.rows?.at(-1) ?? [])
    .reduce((least, other) => other.weightLb < least.weightLb ? { ...other, toFt: row.toFt } : least, row))
}
