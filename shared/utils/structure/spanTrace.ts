export type BeamLoad
  = | { kind: 'uniform', lbPerFt: number, fromFt: number, toFt: number }
    | { kind: 'point', lb: number, atFt: number }

/**
 * A simple span cut at every load's end, exact within each piece: load constant, shear linear, moment quadratic,
 * EI·slope cubic, EI·deflection quartic (down is positive). Lists hold the values at the start of each piece.
 */
export interface SpanTrace {
  spanFt: number
  reactionsLb: [number, number]
  xFt: number[]
  lengthFt: number[]
  loadLbPerFt: number[]
  shearLb: number[]
  momentLbFt: number[]
  slopeLbFt2: number[]
  deflectionLbFt3: number[]
}

function reactions(spanFt: number, loads: BeamLoad[]): [number, number] {
  let total = 0
  let momentAboutStart = 0
  for (const load of loads) {
    const lb = load.kind === 'uniform' ? load.lbPerFt * (load.toFt - load.fromFt) : load.lb
    total += lb
    momentAboutStart += lb * (load.kind === 'uniform' ? (load.fromFt + load.toFt) / 2 : load.atFt)
  }
  const end = momentAboutStart / spanFt
  return [total - end, end]
}

/** What changes where: the line load by `lbPerFt`, the shear by `lb`. In order along the span. */
function changes(loads: BeamLoad[]): { xFt: number, lbPerFt: number, lb: number }[] {
  const list: { xFt: number, lbPerFt: number, lb: number }[] = []
  for (const load of loads) {
    if (load.kind === 'point') list.push({ xFt: load.atFt, lbPerFt: 0, lb: load.lb })
    else list.push({ xFt: load.fromFt, lbPerFt: load.lbPerFt, lb: 0 }, { xFt: load.toFt, lbPerFt: -load.lbPerFt, lb: 0 })
  }
  return list.sort((a, b) => a.xFt - b.xFt)
}

export function traceSpan(spanFt: number, loads: BeamLoad[]): SpanTrace {
  const reactionsLb = reactions(spanFt, loads)
  const trace: SpanTrace = { spanFt, reactionsLb, xFt: [], lengthFt: [], loadLbPerFt: [], shearLb: [], momentLbFt: [], slopeLbFt2: [], deflectionLbFt3: [] }
  let [x, q, v, m, t, y] = [0, 0, reactionsLb[0], 0, 0, 0]
  const advance = (toFt: number): void => {
    const h = toFt - x
    if (h <= 0) return
    trace.xFt.push(x)
    trace.lengthFt.push(h)
    trace.loadLbPerFt.push(q)
    trace.shearLb.push(v)
    trace.momentLbFt.push(m)
    trace.slopeLbFt2.push(t)
    trace.deflectionLbFt3.push(y)
    y += h * (t - h * (m / 2 + h * (v / 6 - h * q / 24)))
    t -= h * (m + h * (v / 2 - h * q / 6))
    m += h * (v - h * q / 2)
    v -= h * q
    x = toFt
  }
  for (const change of changes(loads)) {
    advance(Math.min(change.xFt, spanFt))
    q += change.lbPerFt
    v -= change.lb
  }
  advance(spanFt)
  // So far the slope at the start was taken as 0; the far end does not sink, which gives the true one.
  const startSlope = -y / spanFt
  for (let i = 0; i < trace.xFt.length; i++) {
    trace.slopeLbFt2[i] = at(trace.slopeLbFt2, i) + startSlope
    trace.deflectionLbFt3[i] = at(trace.deflectionLbFt3, i) + startSlope * at(trace.xFt, i)
  }
  return trace
}

function at(list: number[], index: number): number {
  return list[index] ?? 0
}

interface Piece { h: number, q: number, v: number, m: number, t: number, y: number }

function pieceOf(trace: SpanTrace, i: number): Piece {
  return {
    h: at(trace.lengthFt, i), q: at(trace.loadLbPerFt, i), v: at(trace.shearLb, i), m: at(trace.momentLbFt, i),
    t: at(trace.slopeLbFt2, i), y: at(trace.deflectionLbFt3, i),
  }
}

const momentIn = (p: Piece, s: number): number => p.m + s * (p.v - s * p.q / 2)
const slopeIn = (p: Piece, s: number): number => p.t - s * (p.m + s * (p.v / 2 - s * p.q / 6))
const deflectionIn = (p: Piece, s: number): number => p.y + s * (p.t - s * (p.m / 2 + s * (p.v / 6 - s * p.q / 24)))

/** EI·deflection at a point, lb·ft³. */
export function deflectionLbFt3At(trace: SpanTrace, xFt: number): number {
  let i = trace.xFt.length - 1
  while (i > 0 && at(trace.xFt, i) > xFt) i--
  return deflectionIn(pieceOf(trace, i), xFt - at(trace.xFt, i))
}

/** Shear just before a point, lb, by the loads up to it. */
export function shearLbAt(trace: SpanTrace, xFt: number): number {
  let i = trace.xFt.length - 1
  while (i > 0 && at(trace.xFt, i) >= xFt) i--
  return at(trace.shearLb, i) - at(trace.loadLbPerFt, i) * (xFt - at(trace.xFt, i))
}

export interface Peak { size: number, atFt: number }

/** Greatest shear anywhere in the span, as a magnitude. */
export function maxShearLb(trace: SpanTrace): number {
  let most = 0
  for (let i = 0; i < trace.xFt.length; i++) {
    const start = at(trace.shearLb, i)
    most = Math.max(most, Math.abs(start), Math.abs(start - at(trace.loadLbPerFt, i) * at(trace.lengthFt, i)))
  }
  return most
}

/** Greatest moment: at a piece's end, or where the shear passes through zero. */
export function maxMoment(trace: SpanTrace): Peak {
  const peak: Peak = { size: 0, atFt: 0 }
  for (let i = 0; i < trace.xFt.length; i++) {
    const piece = pieceOf(trace, i)
    raise(peak, Math.abs(piece.m), at(trace.xFt, i))
    const zero = piece.q === 0 ? -1 : piece.v / piece.q
    if (zero > 0 && zero < piece.h) raise(peak, Math.abs(momentIn(piece, zero)), at(trace.xFt, i) + zero)
  }
  return peak
}

function raise(peak: Peak, size: number, atFt: number): void {
  if (size > peak.size) {
    peak.size = size
    peak.atFt = atFt
  }
}

/** Greatest EI·deflection, lb·ft³: at a piece's end, or where the slope passes through zero. */
export function maxDeflection(trace: SpanTrace): Peak {
  const peak: Peak = { size: 0, atFt: 0 }
  for (let i = 0; i < trace.xFt.length; i++) {
    const piece = pieceOf(trace, i)
    raise(peak, Math.abs(piece.y), at(trace.xFt, i))
    // Between zeros of the moment the slope only rises or only falls, so each stretch holds one level point at most.
    let from = 0
    for (const to of stretches(piece)) {
      const level = levelPoint(piece, from, to)
      if (level !== null) raise(peak, Math.abs(deflectionIn(piece, level)), at(trace.xFt, i) + level)
      from = to
    }
  }
  return peak
}

/** Ends of the stretches of a piece in which the moment keeps its sign. */
function stretches(piece: Piece): number[] {
  const { q, m, h } = piece
  // A moment that sags at both ends under a downward load sags all between.
  if (q >= 0 && m >= 0 && momentIn(piece, h) >= 0) return [h]
  return [...momentZeros(piece), h]
}

function momentZeros(piece: Piece): number[] {
  const { q, v, m, h } = piece
  const root = v * v + 2 * q * m
  if (root < 0) return []
  // The stable form of the two roots of m + v s − q s²/2.
  const half = v + (v < 0 ? -Math.sqrt(root) : Math.sqrt(root))
  const zeros = [q === 0 ? Number.NaN : half / q, half === 0 ? Number.NaN : -2 * m / half]
  return zeros.filter(s => s > 0 && s < h).sort((a, b) => a - b)
}

/** Where the slope is zero between two points of a piece, by Newton kept inside a shrinking bracket. */
function levelPoint(piece: Piece, from: number, to: number): number | null {
  const start = slopeIn(piece, from)
  const end = slopeIn(piece, to)
  if (start * end > 0 || start === end) return null
  let [low, high] = start < end ? [from, to] : [to, from]
  let s = from + (to - from) * start / (start - end)
  for (let step = 0; step < 60; step++) {
    const slope = slopeIn(piece, s)
    if (slope < 0) low = s
    else high = s
    let next = s + slope / momentIn(piece, s)
    if (!(next > Math.min(low, high) && next < Math.max(low, high))) next = (low + high) / 2
    if (Math.abs(next - s) <= 1e-13 * piece.h) return next
    s = next
  }
  return s
}
