/** NDS 2018 3.3.3.7: a bending member may not be more slender. */
export const GREATEST_SLENDERNESS = 50

/** Effective length of a single-span beam, NDS 2018 Table 3.3.3; `unbracedIn` is the unbraced length. */
export function effectiveLengthIn(unbracedIn: number, depthIn: number, load: 'uniform' | 'midspan-point'): number {
  const short = unbracedIn / depthIn < 7
  if (load === 'uniform') return short ? 2.06 * unbracedIn : 1.63 * unbracedIn + 3 * depthIn
  return short ? 1.8 * unbracedIn : 1.37 * unbracedIn + 3 * depthIn
}

export interface BeamStability { slenderness: number, fbePsi: number, cl: number }

/** Beam stability factor CL, NDS 2018 3.3.3.6 to 3.3.3.8. `fbStarPsi`: bending value with all factors but CL. */
export function beamStability(beam: { breadthIn: number, depthIn: number, effectiveLengthIn: number, eminPsi: number, fbStarPsi: number }): BeamStability {
  const slenderness = Math.sqrt(beam.effectiveLengthIn * beam.depthIn / beam.breadthIn ** 2)
  const fbePsi = 1.2 * beam.eminPsi / slenderness ** 2
  const ratio = fbePsi / beam.fbStarPsi
  const half = (1 + ratio) / 1.9
  return { slenderness, fbePsi, cl: half - Math.sqrt(half ** 2 - ratio / 0.95) }
}

/** NDS 2018 4.4.1.2: sawn lumber no deeper than a nominal 2x8 needs only its ends held (depth up to 8 in rough-sawn). */
export function needsTopEdgeHeld(breadthIn: number, depthIn: number): boolean {
  return depthIn > 8 || depthIn / breadthIn > 7.25 / 1.5
}
