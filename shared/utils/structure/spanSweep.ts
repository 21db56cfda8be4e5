import type { BeamLoad } from './spanTrace'

/** Downward loads of one joist, in order along the span: what changes where, the line load and the shear. */
export interface SweepLoads { xFt: Float64Array, lbPerFt: Float64Array, lb: Float64Array, startLb: number, endLb: number }

/** Greatest effects of one joist, and its shear at two sections. `deflectionLbFt3` is EI·deflection. */
export interface SweptEffects {
  momentLbFt: number
  deflectionLbFt3: number
  shearLb: number
  reactionLb: number
}

export interface ExtraLoad { lbPerFt: number, fromFt: number, toFt: number, pointLb: number }

export function sweepLoads(spanFt: number, loads: readonly BeamLoad[]): SweepLoads {
  const changes: [number, number, number][] = []
  let [total, aboutStart] = [0, 0]
  for (const load of loads) {
    if (load.kind === 'point') changes.push([load.atFt, 0, load.lb])
    else changes.push([load.fromFt, load.lbPerFt, 0], [load.toFt, -load.lbPerFt, 0])
    const lb = load.kind === 'point' ? load.lb : load.lbPerFt * (load.toFt - load.fromFt)
    total += lb
    aboutStart += lb * (load.kind === 'point' ? load.atFt : (load.fromFt + load.toFt) / 2)
  }
  changes.sort((a, b) => a[0] - b[0])
  const endLb = aboutStart / spanFt
  return {
    xFt: Float64Array.from(changes, change => change[0]), lbPerFt: Float64Array.from(changes, change => change[1]), lb: Float64Array.from(changes, change => change[2]),
    startLb: total - endLb, endLb,
  }
}

/** Pieces of the span between changes; one set is filled again and again. */
interface Pieces {
  count: number
  x: Float64Array
  h: Float64Array
  q: Float64Array
  v: Float64Array
  m: Float64Array
  t: Float64Array
  y: Float64Array
}

function roomFor(most: number): Pieces {
  const room = () => new Float64Array(most)
  return { count: 0, x: room(), h: room(), q: room(), v: room(), m: room(), t: room(), y: room() }
}

/**
 * The same sums as `traceSpan`, for the one question asked thousands of times: what would this joist take with one more
 * load on it. Downward loads only: then shear falls all along, the moment has one peak and the slope one zero.
 */
export function spanSweeper(spanFt: number, sectionFt: number, mostLoads: number): (loads: SweepLoads, extra: ExtraLoad) => SweptEffects {
  const pieces = roomFor(2 * mostLoads + 8)
  const effects: SweptEffects = { momentLbFt: 0, deflectionLbFt3: 0, shearLb: 0, reactionLb: 0 }
  return (loads, extra) => {
    const extraLb = extra.lbPerFt * (extra.toFt - extra.fromFt) + extra.pointLb
    const extraEndLb = extraLb * (extra.fromFt + extra.toFt) / 2 / spanFt
    const startLb = loads.startLb + extraLb - extraEndLb
    const endLb = loads.endLb + extraEndLb
    const farY = fill(pieces, loads, extra, spanFt, startLb)
    effects.momentLbFt = peakMoment(pieces)
    effects.deflectionLbFt3 = peakDeflection(pieces, -farY / spanFt)
    effects.shearLb = Math.max(Math.abs(shearAt(pieces, sectionFt)), Math.abs(shearAt(pieces, spanFt - sectionFt)))
    effects.reactionLb = Math.max(startLb, endLb)
    return effects
  }
}

/** Fills the pieces from the start with a slope of 0 there; gives EI·deflection at the far end, which that slope must undo. */
function fill(pieces: Pieces, loads: SweepLoads, extra: ExtraLoad, spanFt: number, startLb: number): number {
  let [x, q, v, m, t, y, count] = [0, 0, startLb, 0, 0, 0, 0]
  const base = loads.xFt.length
  let next = 0
  let extrasDone = 0
  for (;;) {
    const baseX = next < base ? loads.xFt[next]! : Number.POSITIVE_INFINITY
    const extraX = extrasDone === 0 ? extra.fromFt : extrasDone === 1 ? extra.toFt : Number.POSITIVE_INFINITY
    const to = Math.min(baseX, extraX, spanFt)
    const h = to - x
    if (h > 0) {
      pieces.x[count] = x
      pieces.h[count] = h
      pieces.q[count] = q
      pieces.v[count] = v
      pieces.m[count] = m
      pieces.t[count] = t
      pieces.y[count] = y
      count++
      y += h * (t - h * (m / 2 + h * (v / 6 - h * q / 24)))
      t -= h * (m + h * (v / 2 - h * q / 6))
      m += h * (v - h * q / 2)
      v -= h * q
      x = to
    }
    if (baseX === Number.POSITIVE_INFINITY && extraX === Number.POSITIVE_INFINITY) break
    if (extraX <= baseX) {
      q += extrasDone === 0 ? extra.lbPerFt : -extra.lbPerFt
      if (extrasDone === 0) v -= extra.pointLb
      extrasDone++
    }
    else {
      q += loads.lbPerFt[next]!
      v -= loads.lb[next]!
      next++
    }
  }
  pieces.count = count
  return y
}

/** Where the shear passes through zero, inside a piece or in the jump at its start. */
function peakMoment({ count, h, q, v, m }: Pieces): number {
  for (let i = 0; i < count; i++) {
    if (v[i]! <= 0) return Math.max(0, m[i]!)
    // Where a load ended, rounding may leave a hair of it, up or down.
    if (q[i]! > 0 && v[i]! < q[i]! * h[i]!) return m[i]! + v[i]! ** 2 / q[i]! / 2
    if (i === count - 1) return m[i]! + h[i]! * v[i]! / 2
  }
  return 0
}

function peakDeflection({ count, h, q, v, m, t, y, x }: Pieces, startSlope: number): number {
  for (let i = 0; i < count; i++) {
    const [hi, qi, vi, mi, ti] = [h[i]!, q[i]!, v[i]!, m[i]!, t[i]! + startSlope]
    const end = ti - hi * (mi + hi * (vi / 2 - hi * qi / 6))
    if (end > 0 && i < count - 1) continue
    const s = levelPoint(ti, end, mi, vi, qi, hi)
    return Math.max(0, y[i]! + startSlope * x[i]! + s * (ti - s * (mi / 2 + s * (vi / 6 - s * qi / 24))))
  }
  return 0
}

/** Newton from the chord; near a wall, where the moment vanishes, the chord's point already stands. */
function levelPoint(ti: number, end: number, mi: number, vi: number, qi: number, hi: number): number {
  let s = ti === end ? 0 : Math.min(hi, Math.max(0, hi * ti / (ti - end)))
  for (let step = 0; step < 8; step++) {
    const bend = mi + s * (vi - s * qi / 2)
    if (!(bend > 0)) break
    const move = (ti - s * (mi + s * (vi / 2 - s * qi / 6))) / bend
    s = Math.min(hi, Math.max(0, s + move))
    if (Math.abs(move) < 1e-9 * hi) break
  }
  return s
}

function shearAt({ count, x, v, q }: Pieces, atFt: number): number {
  let i = count - 1
  while (i > 0 && x[i]! >= atFt) i--
  return count === 0 ? 0 : v[i]! - q[i]! * (atFt - x[i]!)
}
