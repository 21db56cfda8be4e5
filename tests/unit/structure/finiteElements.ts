import type { BeamLoad } from '../../../shared/utils/structure/beam'
import type { LoadField } from '../../../shared/types/loadPlan'

/** A second way to every answer: joists and strongbacks as two-node cubic beam elements, one dense set of equations. */

function solve(a: number[][], b: number[]): number[] {
  const n = b.length
  const rows = a.map((row, i) => Float64Array.from([...row, b[i] ?? 0]))
  const row = (i: number): Float64Array => rows[i] ?? new Float64Array(n + 1)
  // The stiffness is symmetric and positive: no pivoting is needed.
  for (let i = 0; i < n; i++) {
    const pivot = row(i)
    for (let r = i + 1; r < n; r++) {
      const line = row(r)
      const factor = (line[i] ?? 0) / (pivot[i] ?? 0)
      if (factor !== 0) for (let c = i; c <= n; c++) line[c] = (line[c] ?? 0) - factor * (pivot[c] ?? 0)
    }
  }
  const x = new Array<number>(n).fill(0)
  for (let i = n - 1; i >= 0; i--) {
    let sum = row(i)[n] ?? 0
    for (let c = i + 1; c < n; c++) sum -= (row(i)[c] ?? 0) * (x[c] ?? 0)
    x[i] = sum / (row(i)[i] ?? 0)
  }
  return x
}

function add(matrix: number[][], freedoms: number[], ei: number, h: number): void {
  const k = [[12, 6 * h, -12, 6 * h], [6 * h, 4 * h * h, -6 * h, 2 * h * h], [-12, -6 * h, 12, -6 * h], [6 * h, 2 * h * h, -6 * h, 4 * h * h]]
  freedoms.forEach((row, i) => freedoms.forEach((column, j) => {
    const line = matrix[row] ?? []
    line[column] = (line[column] ?? 0) + ei / h ** 3 * (k[i]?.[j] ?? 0)
  }))
}

export interface GrillageByElements { maxDeflectionFt: number[], maxMomentLbFt: number[] }

/** Greatest deflection and moment of each joist at the nodes; strongbacks must stand at a node. */
export function grillageByElements(field: Omit<LoadField, 'ratedPsf'>, loads: BeamLoad[][], elements: number): GrillageByElements {
  const h = field.spanFt / elements
  const joistEi = field.joistEiLbIn2 / 144
  const perJoist = 2 * (elements + 1)
  const w = (joist: number, node: number): number => joist * perJoist + 2 * node
  const turn = (strongback: number, joist: number): number => field.joistCount * perJoist + strongback * field.joistCount + joist
  const size = field.joistCount * perJoist + field.strongbacks.length * field.joistCount
  const k = Array.from({ length: size }, () => new Array<number>(size).fill(0))
  const force = new Array<number>(size).fill(0)
  for (let joist = 0; joist < field.joistCount; joist++) {
    for (let e = 0; e < elements; e++) {
      const freedoms = [w(joist, e), w(joist, e) + 1, w(joist, e + 1), w(joist, e + 1) + 1]
      add(k, freedoms, joistEi, h)
      for (const [i, value] of elementLoad(loads[joist] ?? [], e * h, h).entries()) force[freedoms[i] ?? 0] = (force[freedoms[i] ?? 0] ?? 0) + value
    }
    for (const node of [0, elements]) (k[w(joist, node)] ?? [])[w(joist, node)] = 1e15
  }
  field.strongbacks.forEach((strongback, s) => {
    const node = Math.round(strongback.atFt / h)
    for (let joist = 0; joist + 1 < field.joistCount; joist++) {
      add(k, [w(joist, node), turn(s, joist), w(joist + 1, node), turn(s, joist + 1)], strongback.eiLbIn2 / 144, field.spacingIn / 12)
    }
  })
  const u = solve(k, force)
  const of = (index: number): number => u[index] ?? 0
  return {
    maxDeflectionFt: loads.map((_, joist) => Math.max(...Array.from({ length: elements + 1 }, (_n, node) => Math.abs(of(w(joist, node)))))),
    maxMomentLbFt: loads.map((list, joist) => Math.max(...Array.from({ length: elements }, (_n, e) => {
      const [w1, t1, w2, t2] = [of(w(joist, e)), of(w(joist, e) + 1), of(w(joist, e + 1)), of(w(joist, e + 1) + 1)]
      const held = elementLoad(list, e * h, h)[1] ?? 0
      return Math.abs(joistEi / h ** 3 * (6 * h * w1 + 4 * h * h * t1 - 6 * h * w2 + 2 * h * h * t2) - held)
    }))),
  }
}

/** Nodal loads of one element by its shape functions, integrated over 200 strips. */
function elementLoad(loads: BeamLoad[], fromFt: number, h: number): number[] {
  const total = [0, 0, 0, 0]
  const put = (lb: number, s: number): void => {
    const r = s / h
    const shape = [1 - 3 * r ** 2 + 2 * r ** 3, h * (r - 2 * r ** 2 + r ** 3), 3 * r ** 2 - 2 * r ** 3, h * (r ** 3 - r ** 2)]
    shape.forEach((value, i) => { total[i] = (total[i] ?? 0) + lb * value })
  }
  for (const load of loads) {
    if (load.kind === 'point') {
      if (load.atFt >= fromFt && load.atFt < fromFt + h) put(load.lb, load.atFt - fromFt)
      continue
    }
    const [from, to] = [Math.max(load.fromFt, fromFt), Math.min(load.toFt, fromFt + h)]
    const strip = (to - from) / 200
    if (strip > 0) for (let i = 0; i < 200; i++) put(load.lbPerFt * strip, from + (i + 0.5) * strip - fromFt)
  }
  return total
}
