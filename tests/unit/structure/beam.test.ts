import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { simpleSpan } from '../../../shared/utils/structure/beam'
import type { BeamLoad } from '../../../shared/utils/structure/beam'
import { StructureRefused } from '../../../shared/utils/structure/structureRefused'
import { grillageByElements } from './finiteElements'

const beam = { spanFt: 16, eiLbIn2: 8e7 }
// Sixteenths of an inch and coarser: a load a hair's breadth off the wall is a case of its own.
const share = fc.integer({ min: 0, max: 3072 }).map(sixteenths => sixteenths / 3072)
const anyLoad: fc.Arbitrary<BeamLoad> = fc.oneof(
  fc.record({ at: share, lb: fc.double({ min: 1, max: 500, noNaN: true }) }).map(({ at, lb }): BeamLoad => ({ kind: 'point', lb, atFt: 16 * at })),
  fc.record({ from: share, to: share, lbPerFt: fc.double({ min: 1, max: 200, noNaN: true }) })
    .filter(({ from, to }) => Math.abs(from - to) > 0.01)
    .map(({ from, to, lbPerFt }): BeamLoad => ({ kind: 'uniform', lbPerFt, fromFt: 16 * Math.min(from, to), toFt: 16 * Math.max(from, to) })),
)
const anyLoads = fc.array(anyLoad, { minLength: 1, maxLength: 8 })
const mirrored = (load: BeamLoad): BeamLoad => load.kind === 'point' ? { ...load, atFt: 16 - load.atFt } : { ...load, fromFt: 16 - load.toFt, toFt: 16 - load.fromFt }
const scaled = (load: BeamLoad, by: number): BeamLoad => load.kind === 'point' ? { ...load, lb: load.lb * by } : { ...load, lbPerFt: load.lbPerFt * by }
const near = (a: number, b: number): void => expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-8 * Math.max(1, Math.abs(a), Math.abs(b)))

describe('a simple span', () => {
  it('reactions carry the whole load, and superpose', () => {
    fc.assert(fc.property(anyLoads, anyLoads, (first, second) => {
      const [a, b, both] = [simpleSpan(beam, first), simpleSpan(beam, second), simpleSpan(beam, [...first, ...second])]
      const total = [...first, ...second].reduce((sum, load) => sum + (load.kind === 'point' ? load.lb : load.lbPerFt * (load.toFt - load.fromFt)), 0)
      near(both.reactionsLb[0] + both.reactionsLb[1], total)
      near(both.reactionsLb[0], a.reactionsLb[0] + b.reactionsLb[0])
      for (const effect of ['maxMomentLbFt', 'maxShearLb', 'maxDeflectionIn'] as const) {
        expect(both[effect]).toBeLessThanOrEqual((a[effect] + b[effect]) * (1 + 1e-9))
        if (effect !== 'maxShearLb') expect(both[effect]).toBeGreaterThanOrEqual(Math.max(a[effect], b[effect]) * (1 - 1e-9))
      }
    }))
  })

  it('doubles with its loads, and the mirror image has the same effects', () => {
    fc.assert(fc.property(anyLoads, (loads) => {
      const [one, two, mirror] = [simpleSpan(beam, loads), simpleSpan(beam, loads.map(load => scaled(load, 2))), simpleSpan(beam, loads.map(mirrored))]
      near(mirror.reactionsLb[0], one.reactionsLb[1])
      for (const effect of ['maxMomentLbFt', 'maxShearLb', 'maxDeflectionIn'] as const) {
        near(two[effect], 2 * one[effect])
        near(mirror[effect], one[effect])
      }
    }))
  })

  it('agrees with finite elements within 0.5 %', () => {
    fc.assert(fc.property(anyLoads, (loads) => {
      const exact = simpleSpan(beam, loads)
      const { maxDeflectionFt, maxMomentLbFt } = grillageByElements({ ...beam, spacingIn: 16, joistCount: 1, joistEiLbIn2: beam.eiLbIn2, strongbacks: [] }, [loads], 64)
      expect(Math.abs((maxDeflectionFt[0] ?? 0) * 12 - exact.maxDeflectionIn)).toBeLessThanOrEqual(0.005 * exact.maxDeflectionIn + 1e-9)
      // A peak under a point load may fall between two nodes, at most one element (1/64 of the span) away.
      const total = exact.reactionsLb[0] + exact.reactionsLb[1]
      const found = maxMomentLbFt[0] ?? 0
      expect(found).toBeLessThanOrEqual(exact.maxMomentLbFt * 1.005 + 1e-6)
      expect(found).toBeGreaterThanOrEqual(exact.maxMomentLbFt * 0.995 - total * 16 / 64 / 2)
    }), { numRuns: 25 })
  })

  it('without loads nothing bends', () => {
    expect(simpleSpan(beam, [])).toEqual({ reactionsLb: [0, 0], maxMomentLbFt: 0, maxShearLb: 0, maxDeflectionIn: 0 })
  })

  it('a weight right over a bearing wall bends nothing and rests on that wall', () => {
    const effects = simpleSpan(beam, [{ kind: 'point', lb: 900, atFt: 0 }, { kind: 'point', lb: 300, atFt: 16 }])
    expect(effects).toEqual({ reactionsLb: [900, 300], maxMomentLbFt: 0, maxShearLb: 0, maxDeflectionIn: 0 })
  })

  it.each([
    ['a span of nothing', { spanFt: 0, eiLbIn2: 1 }, [], 'not-a-positive-number', 'spanFt'],
    ['a stiffness that is no number', { spanFt: 10, eiLbIn2: Number.NaN }, [], 'not-a-positive-number', 'eiLbIn2'],
    ['a load beyond the wall', beam, [{ kind: 'point', lb: 1, atFt: 16.1 }], 'load-outside-span', 'loads[0]'],
    ['a load before the wall', beam, [{ kind: 'uniform', lbPerFt: 1, fromFt: -1, toFt: 2 }], 'load-outside-span', 'loads[0]'],
    ['a load that ends before it begins', beam, [{ kind: 'uniform', lbPerFt: 1, fromFt: 3, toFt: 2 }], 'load-outside-span', 'loads[0]'],
    ['a line load of no length', beam, [{ kind: 'uniform', lbPerFt: 1, fromFt: 3, toFt: 3 }], 'load-without-length', 'loads[0]'],
    ['a load without a number', beam, [{ kind: 'point', lb: Number.NaN, atFt: 2 }], 'not-a-number', 'loads[0]'],
  ] as const)('refuses %s', (_name, span, loads, code, at) => {
    const attempt = (): unknown => simpleSpan(span, [...loads])
    expect(attempt).toThrow(StructureRefused)
    expect(attempt).toThrow(expect.objectContaining({ code, at }))
  })
})
