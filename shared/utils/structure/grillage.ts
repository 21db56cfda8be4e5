import type { LoadField } from '../../types/loadPlan'
import type { BeamLoad, SpanTrace } from './spanTrace'
import { deflectionLbFt3At } from './spanTrace'

/** EI·deflection at `xFt` for 1 lb at `atFt` on a simple span, lb·ft³ per lb (AWC Design Aid 6, point load at any point). */
export function unitDeflectionLbFt3(spanFt: number, xFt: number, atFt: number): number {
  const [near, far] = xFt <= atFt ? [xFt, spanFt - atFt] : [spanFt - xFt, atFt]
  return far * near * (spanFt ** 2 - far ** 2 - near ** 2) / (6 * spanFt)
}

/** Solves A·x = b in place for a symmetric, positive A given by its lower band: rows of `band + 1` entries, diagonal last. */
function solveBanded(rows: Float64Array[], band: number, x: Float64Array): void {
  const entry = (i: number, j: number): number => rows[i]?.[j - i + band] ?? 0
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i] ?? new Float64Array(band + 1)
    for (let j = Math.max(0, i - band); j <= i; j++) {
      let sum = row[j - i + band] ?? 0
      for (let k = Math.max(0, i - band, j - band); k < j; k++) sum -= entry(i, k) * entry(j, k)
      row[j - i + band] = i === j ? Math.sqrt(sum) : sum / entry(j, j)
    }
    let sum = x[i] ?? 0
    for (let k = Math.max(0, i - band); k < i; k++) sum -= entry(i, k) * (x[k] ?? 0)
    x[i] = sum / entry(i, i)
  }
  for (let i = rows.length - 1; i >= 0; i--) {
    let sum = x[i] ?? 0
    for (let k = i + 1; k <= Math.min(rows.length - 1, i + band); k++) sum -= entry(k, i) * (x[k] ?? 0)
    x[i] = sum / entry(i, i)
  }
}

/** Second difference over neighbouring joists, written out: how far a row at joist i couples to one at i + step. */
const SECOND_DIFFERENCE_SQUARED = [6, -4, 1] as const
const THREE_MOMENT = [4, 1, 0] as const

/**
 * Forces that strongbacks put on the joists they tie, as point loads per joist (up is negative): joists as simple beams,
 * each strongback a continuous beam with free ends over all joists. Solved exactly by the strongbacks' moments: the
 * three-moment equation with the joists as sinking supports. `traces` hold each joist under its own loads.
 */
export function strongbackForces(field: LoadField, traces: SpanTrace[]): BeamLoad[][] {
  const forces: BeamLoad[][] = traces.map(() => [])
  const strongbacks = field.strongbacks.filter(strongback => strongback.eiLbIn2 > 0)
  const [count, inner] = [strongbacks.length, traces.length - 2]
  if (count === 0 || inner < 1) return forces
  const spacingFt = field.spacingIn / 12
  const joistEi = field.joistEiLbIn2 / 144
  const flexibility = strongbacks.map(a => strongbacks.map(b => unitDeflectionLbFt3(field.spanFt, a.atFt, b.atFt) / joistEi))
  const bend = strongbacks.map(strongback => spacingFt / (6 * strongback.eiLbIn2 / 144))
  const sunk = strongbacks.map(strongback => traces.map(trace => deflectionLbFt3At(trace, strongback.atFt) / joistEi))
  // Unknowns in the order joist, strongback: two joists on, the coupling ends.
  const band = 3 * count - 1
  const moments = new Float64Array(inner * count)
  const rows: Float64Array[] = []
  for (let i = 0; i < inner; i++) {
    for (let k = 0; k < count; k++) {
      const row = new Float64Array(band + 1)
      const here = i * count + k
      for (let j = Math.max(0, i - 2); j <= i; j++) {
        for (let l = 0; l < count; l++) {
          const there = j * count + l
          const step = i - j as 0 | 1 | 2
          const own = k === l ? (bend[k] ?? 0) * THREE_MOMENT[step] : 0
          if (there <= here) row[there - here + band] = own + (flexibility[k]?.[l] ?? 0) * SECOND_DIFFERENCE_SQUARED[step] / spacingFt ** 2
        }
      }
      rows.push(row)
      const u = sunk[k] ?? []
      moments[here] = ((u[i] ?? 0) - 2 * (u[i + 1] ?? 0) + (u[i + 2] ?? 0)) / spacingFt
    }
  }
  solveBanded(rows, band, moments)
  strongbacks.forEach(({ atFt }, k) => {
    const momentAt = (joist: number): number => joist < 1 || joist > inner ? 0 : moments[(joist - 1) * count + k] ?? 0
    forces.forEach((list, joist) => {
      const lb = -(momentAt(joist - 1) - 2 * momentAt(joist) + momentAt(joist + 1)) / spacingFt
      if (lb !== 0) list.push({ kind: 'point', lb, atFt })
    })
  })
  return forces
}
