import type { StateTone } from '../ui/stateTone'

export type LoadTone = Extract<StateTone, 'within' | 'near' | 'over' | 'unknown'>
export type MarkTone = Extract<StateTone, 'dormant' | 'watch' | 'active' | 'unknown'>
export type MarkGlyphKind = 'crack' | 'nail-pops' | 'sag' | 'stain'

export interface SectionRoom {
  name: string
  /** Share of the length of the home; shares are scaled to sum to 1. */
  widthShare: number
  /** The wall after this room carries the joists: drawn thick. */
  bearingAfter?: boolean
}

export interface SectionLoad {
  id: string
  label: string
  /** Words for the weight with its unit: '165 lb'. */
  weightText: string
  weightLb: number
  state: LoadTone
  /** Middle of the load along the home, 0 to 1. */
  positionShare: number
  widthShare?: number
  /** Share of the rating it uses where it stands; drawn as height. */
  ratingShare?: number
}

export interface SectionMark {
  id: string
  /** The number with its unit: '2.1 mm', '5 pops'. */
  label: string
  /** Words for the table: 'crack in the living room'. */
  name?: string
  positionShare: number
  kind: MarkGlyphKind
  activity: MarkTone
  /** 0 to 5: drawn as stroke weight. */
  widthClass?: number
}

export interface SectionContent { rooms: readonly SectionRoom[], loads: readonly SectionLoad[], marks: readonly SectionMark[] }

/** A box in drawing units, x and y at its top left. */
export interface Box { x: number, y: number, w: number, h: number }

export interface SectionLabel extends Box { text: string, tone: StateTone, key: boolean, leader?: { x: number, fromY: number, toY: number } }
export interface SectionBlock extends Box { id: string, state: LoadTone }
export interface SectionStroke extends Box { id: string, kind: MarkGlyphKind, activity: MarkTone, weight: number }

export interface SectionFrame {
  widthPx: number
  heightPx: number
  ridgeX: number
  ridgeY: number
  /** Fall of the roof per unit of length. */
  fall: number
  wallLeft: number
  wallRight: number
  joistTopY: number
  ceilingY: number
  groundY: number
}

export interface SectionDrawing extends SectionFrame {
  walls: { x: number, thick: boolean }[]
  ticks: number[]
  blocks: SectionBlock[]
  strokes: SectionStroke[]
  labels: SectionLabel[]
  roomNames: (Box & { text: string })[]
  /** What found no room in the drawing, said under it: by its number where one is drawn. */
  legend: { key: number | null, text: string }[]
}
