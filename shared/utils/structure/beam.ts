import type { BeamLoad } from './spanTrace'
import { maxDeflection, maxMoment, maxShearLb, traceSpan } from './spanTrace'
import { StructureRefused, requirePositive } from './structureRefused'

export type { BeamLoad } from './spanTrace'

export interface SimpleSpanEffects {
  reactionsLb: [number, number]
  maxMomentLbFt: number
  maxShearLb: number
  maxDeflectionIn: number
}

function requireInside(load: BeamLoad, index: number, spanFt: number): void {
  const at = `loads[${index}]`
  const [from, to, size] = load.kind === 'uniform' ? [load.fromFt, load.toFt, load.lbPerFt] : [load.atFt, load.atFt, load.lb]
  if (!Number.isFinite(size)) throw new StructureRefused('not-a-number', at)
  if (!(from >= 0 && to <= spanFt && from <= to)) throw new StructureRefused('load-outside-span', at)
  if (load.kind === 'uniform' && from === to) throw new StructureRefused('load-without-length', at)
}

/**
 * A beam on two supports under any loads of AWC Design Aid 6: reactions, and the greatest moment, shear (just inside
 * the supports) and deflection anywhere along it, as magnitudes. Down is positive; shear deformation is left out.
 */
export function simpleSpan(beam: { spanFt: number, eiLbIn2: number }, loads: BeamLoad[]): SimpleSpanEffects {
  requirePositive(beam.spanFt, 'spanFt')
  requirePositive(beam.eiLbIn2, 'eiLbIn2')
  loads.forEach((load, index) => requireInside(load, index, beam.spanFt))
  const trace = traceSpan(beam.spanFt, loads)
  return {
    reactionsLb: trace.reactionsLb,
    maxMomentLbFt: maxMoment(trace).size,
    maxShearLb: maxShearLb(trace),
    maxDeflectionIn: maxDeflection(trace).size * 1728 / beam.eiLbIn2,
  }
}
