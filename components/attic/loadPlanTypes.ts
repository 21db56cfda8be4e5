import type { LoadTone } from '../house/sectionTypes'

export interface LoadPlanField { spanFt: number, spacingIn: number, joistCount: number }

export interface LoadPlanItem {
  id: string
  name: string
  /** From the first wall, along the joists. */
  xFt: number
  /** From the first joist, across them. */
  yFt: number
  lengthFt: number
  widthFt: number
  weightLb: number
  state: LoadTone
  /** Presses more than the rating in the middle half, whatever the joists say. */
  dense?: boolean
}

/** `utilisation` is null while nothing is rated: there is nothing to hold the load against. */
export interface LoadPlanJoist { utilisation: number | null, state: LoadTone }

/** The bearing walls at x = 0 and x = span: 'south wall', 'hall wall'. */
export interface LoadPlanWalls { start: string, end: string }

export interface LoadPlanSpot { xFt: number, yFt: number, lengthFt: number, widthFt: number }

/** A new place or size, or both; what is left out stays. */
export interface LoadPlanChange { id: string, xFt?: number, yFt?: number, lengthFt?: number, widthFt?: number }

/** Which corner is pulled: at the first or the last wall, on the side of the first or the last joist. */
export interface LoadPlanCorner { x: 'start' | 'end', y: 'first' | 'last' }

/** A stretch of places for the middle of an item, in shares of the plan. */
export interface LoadPlanShade { x: number, y: number, w: number, h: number, tone: 'near' | 'over' }
