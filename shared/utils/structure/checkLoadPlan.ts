import type { LoadField, LoadPlanProblem, LoadPlanProblemCode, PlacedItem } from '../../types/loadPlan'

/** Room for rounding in entered feet: about a hundredth of a thousandth of an inch. */
const ROUNDING_FT = 1e-6
const MOST_JOISTS = 1000
/** Longer than any joist this program judges; the span tables of the code end at 26 ft. Ours. */
export const LONGEST_SPAN_FT = 40
/** Feet or millimetres entered as inches land outside these; ours. */
const PLAUSIBLE_SPACING_IN = { least: 4, most: 96 } as const

type At = LoadPlanProblem['at']

class Problems {
  readonly list: LoadPlanProblem[] = []

  add(code: LoadPlanProblemCode, at: At, measure: string, value: number, limit: number | null = null): false {
    this.list.push({ code, at, measure, value, limit })
    return false
  }

  positive(at: At, measure: string, value: number): boolean {
    return (Number.isFinite(value) && value > 0) || this.add('not-positive', at, measure, value)
  }

  notNegative(at: At, measure: string, value: number): boolean {
    return (Number.isFinite(value) && value >= 0) || this.add('negative', at, measure, value)
  }
}

/** Width of the field across the joists, first to last. */
export function fieldWidthFt(field: Pick<LoadField, 'spacingIn' | 'joistCount'>): number {
  return (field.joistCount - 1) * field.spacingIn / 12
}

function checkField(problems: Problems, field: LoadField): boolean {
  const at: At = { part: 'field' }
  const spanSound = problems.positive(at, 'spanFt', field.spanFt)
    && (field.spanFt <= LONGEST_SPAN_FT || problems.add('span-too-long', at, 'spanFt', field.spanFt, LONGEST_SPAN_FT))
  const { least, most } = PLAUSIBLE_SPACING_IN
  const spacingSound = problems.positive(at, 'spacingIn', field.spacingIn)
    && ((field.spacingIn >= least && field.spacingIn <= most) || problems.add('spacing-not-plausible', at, 'spacingIn', field.spacingIn, field.spacingIn < least ? least : most))
  let sound = spanSound && spacingSound
  if (!Number.isInteger(field.joistCount)) sound = problems.add('not-whole', at, 'joistCount', field.joistCount)
  else if (field.joistCount < 2) sound = problems.add('too-few-joists', at, 'joistCount', field.joistCount, 2)
  else if (field.joistCount > MOST_JOISTS) sound = problems.add('too-many-joists', at, 'joistCount', field.joistCount, MOST_JOISTS)
  problems.notNegative(at, 'ratedPsf', field.ratedPsf)
  problems.positive(at, 'joistEiLbIn2', field.joistEiLbIn2)
  field.strongbacks.forEach((strongback, index) => {
    const here: At = { part: 'strongback', index }
    problems.notNegative(here, 'eiLbIn2', strongback.eiLbIn2)
    if (spanSound && !(strongback.atFt > 0 && strongback.atFt < field.spanFt)) problems.add('outside-span', here, 'atFt', strongback.atFt, field.spanFt)
  })
  return sound
}

function checkItem(problems: Problems, field: LoadField, item: PlacedItem, fieldSound: boolean): void {
  const at: At = { part: 'item', id: item.id }
  problems.notNegative(at, 'weightLb', item.weightLb)
  const extents = [
    { start: 'xFt', size: 'lengthFt', from: item.xFt, by: item.lengthFt, limit: field.spanFt },
    { start: 'yFt', size: 'widthFt', from: item.yFt, by: item.widthFt, limit: fieldWidthFt(field) },
  ]
  for (const { start, size, from, by, limit } of extents) {
    const sized = problems.positive(at, size, by)
    if (!(from >= -ROUNDING_FT)) problems.add('outside-field', at, start, from, 0)
    else if (sized && fieldSound && !(from + by <= limit + ROUNDING_FT)) problems.add('outside-field', at, start, from + by, limit)
  }
}

/** Everything that makes a plan impossible to calculate; empty for a sound one. */
export function checkLoadPlan(field: LoadField, items: PlacedItem[]): LoadPlanProblem[] {
  const problems = new Problems()
  const fieldSound = checkField(problems, field)
  for (const item of items) checkItem(problems, field, item, fieldSound)
  return problems.list
}
