import type { JoistRatios, LoadField, LoadPlanAnswer, LoadPlanProblem, PlacedItem } from '../../types/loadPlan'
import { checkLoadPlan, fieldWidthFt } from './checkLoadPlan'
import { strongbackForces } from './grillage'
import { joistLoads } from './itemShares'
import type { BeamLoad, SpanTrace } from './spanTrace'
import { maxDeflection, maxMoment, traceSpan } from './spanTrace'
import { StructureRefused } from './structureRefused'

/** A plan that cannot be calculated; `problems` holds every reason. Ask `checkLoadPlan` first to get them as values. */
export class LoadPlanRefused extends StructureRefused {
  readonly problems: LoadPlanProblem[]

  constructor(problems: LoadPlanProblem[]) {
    const [first] = problems
    super(first?.code ?? 'no-problem', first ? `${first.at.part} ${first.measure}` : 'plan')
    this.name = 'LoadPlanRefused'
    this.problems = problems
  }
}

/** Rated effects of one joist: w·L²/8 and 5wL⁴/384 with w the rating over one spacing. */
export interface RatedEffects { momentLbFt: number, deflectionLbFt3: number }

export function ratedEffects(field: Pick<LoadField, 'spanFt' | 'spacingIn' | 'ratedPsf'>): RatedEffects {
  const lbPerFt = field.ratedPsf * field.spacingIn / 12
  return { momentLbFt: lbPerFt * field.spanFt ** 2 / 8, deflectionLbFt3: 5 * lbPerFt * field.spanFt ** 4 / 384 }
}

/** Load over limit; without any limit an unloaded joist is at 0 and a loaded one beyond every bound. */
export function ratioOf(load: number, limit: number): number {
  if (load === 0) return 0
  return limit > 0 ? load / limit : Number.POSITIVE_INFINITY
}

export function joistRatios(trace: SpanTrace, rated: RatedEffects): JoistRatios {
  return {
    momentRatio: ratioOf(maxMoment(trace).size, rated.momentLbFt),
    deflectionRatio: ratioOf(maxDeflection(trace).size, rated.deflectionLbFt3),
  }
}

/** Each joist again, with the forces of the strongbacks added to its own loads. */
export function sharedTraces(field: LoadField, loads: BeamLoad[][], traces: SpanTrace[]): SpanTrace[] {
  const forces = strongbackForces(field, traces)
  return traces.map((trace, joist) => {
    const added = forces[joist] ?? []
    return added.length === 0 ? trace : traceSpan(field.spanFt, [...(loads[joist] ?? []), ...added])
  })
}

export function ratedTotalLb(field: LoadField): number {
  return field.ratedPsf * field.spanFt * fieldWidthFt(field)
}

/**
 * What the items do to each joist, as shares of what the rated load spread evenly would do: moment, deflection, and the
 * greater of the two. Throws LoadPlanRefused for a field or item that cannot be.
 */
export function loadPlan(field: LoadField, items: PlacedItem[]): LoadPlanAnswer {
  const problems = checkLoadPlan(field, items)
  if (problems.length > 0) throw new LoadPlanRefused(problems)
  const rated = ratedEffects(field)
  const loads = joistLoads(field, items)
  const traces = loads.map(list => traceSpan(field.spanFt, list))
  return {
    totalLb: items.reduce((sum, item) => sum + item.weightLb, 0),
    ratedTotalLb: ratedTotalLb(field),
    joists: traces.map((trace) => {
      const ratios = joistRatios(trace, rated)
      return { ...ratios, utilisation: Math.max(ratios.momentRatio, ratios.deflectionRatio) }
    }),
    withStrongbacks: sharedTraces(field, loads, traces).map(trace => joistRatios(trace, rated)),
  }
}
