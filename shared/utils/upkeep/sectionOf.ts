import type { AtticOfUnit, MarkOfUnit, SectionParts } from '../../types/home'
import type { NamedContentsItem } from '../../types/item'
import type { Activity } from '../../types/mark'
import { countWords } from '../messages/activityMessages'
import { MARK_KIND_WORDS } from '../messages/markMessages'
import { formatWeight, formatWidth, type UnitSystem } from '../units'

export type SectionLoadState = 'within' | 'near' | 'over' | 'unknown'

export interface SectionRoomPart { name: string, widthShare: number }
export interface SectionLoadPart {
  id: string
  label: string
  weightText: string
  weightLb: number
  state: SectionLoadState
  /** Middle of the load along the home, 0 to 1. */
  positionShare: number
  widthShare: number
  ratingShare?: number
}
export interface SectionMarkPart {
  id: string
  label: string
  name: string
  positionShare: number
  kind: MarkOfUnit['kind']
  activity: 'dormant' | 'watch' | 'active' | 'unknown'
  widthClass?: number
}
export interface SectionDrawn { rooms: SectionRoomPart[], loads: SectionLoadPart[], marks: SectionMarkPart[] }

/** How one item was judged where it stands. */
export interface ItemVerdict { state: 'within' | 'near' | 'over', utilisation: number | null }

/** A home of unmeasured rooms is drawn with equal ones; an unmeasured field gets this width (ours), or what its items need. */
const UNKNOWN_ROOM_FT = 12
const UNKNOWN_FIELD_FT = 24

/**
 * What the section through a home is drawn from: rooms side by side by their length, stored items by their place across the
 * joists with fields and attics side by side, open marks by their pin. `verdicts` by item id come from the load plan; without
 * them every item of an attic carries that attic's own state.
 */
export function sectionOf(parts: SectionParts, options: { system?: UnitSystem, verdicts?: ReadonlyMap<string, ItemVerdict> } = {}): SectionDrawn {
  const rooms = placeRooms(parts.rooms)
  return {
    rooms: rooms.map(({ name, share }) => ({ name, widthShare: share })),
    loads: placeLoads(parts.attics, options.verdicts ?? new Map(), options.system ?? 'us'),
    marks: parts.marks.filter(mark => mark.state === 'open').map(mark => markPart(mark, rooms)),
  }
}

interface PlacedRoom { id: string, name: string, from: number, share: number }

function placeRooms(rooms: SectionParts['rooms']): PlacedRoom[] {
  const lengths = rooms.map(room => room.lengthFt ?? room.widthFt)
  const known = lengths.filter(length => length !== null)
  const usual = known.length > 0 ? known.reduce((sum, length) => sum + length, 0) / known.length : UNKNOWN_ROOM_FT
  const total = lengths.reduce<number>((sum, length) => sum + (length ?? usual), 0)
  let from = 0
  return rooms.map(({ id, name }, i) => {
    const share = (lengths[i] ?? usual) / total
    const placed = { id, name, from, share }
    from += share
    return placed
  })
}

function fieldWidthFt(attic: AtticOfUnit, fieldNumber: number): number {
  const field = attic.fields[fieldNumber - 1]
  const measured = field?.joistCount && field.spacingIn ? (field.joistCount - 1) * field.spacingIn / 12 : 0
  const needed = Math.max(0, ...attic.items.filter(item => item.fieldNumber === fieldNumber).map(item => item.yFt + item.widthFt))
  return Math.max(measured > 0 ? measured : UNKNOWN_FIELD_FT, needed)
}

function placeLoads(attics: readonly AtticOfUnit[], verdicts: ReadonlyMap<string, ItemVerdict>, system: UnitSystem): SectionLoadPart[] {
  let reachedFt = 0
  const placed = attics.flatMap((attic) => {
    const fieldCount = Math.max(1, attic.fields.length, ...attic.items.map(item => item.fieldNumber))
    const startsFt = Array.from({ length: fieldCount }, (_, i) => {
      const start = reachedFt
      reachedFt += fieldWidthFt(attic, i + 1)
      return start
    })
    return attic.items.map(item => ({ attic, item, fromFt: (startsFt[item.fieldNumber - 1] ?? 0) + item.yFt }))
  })
  return placed.map(({ attic, item, fromFt }) => loadPart(attic, item, verdicts.get(item.id), {
    positionShare: (fromFt + item.widthFt / 2) / reachedFt, widthShare: item.widthFt / reachedFt,
  }, system))
}

function loadPart(attic: AtticOfUnit, item: NamedContentsItem, verdict: ItemVerdict | undefined, place: { positionShare: number, widthShare: number }, system: UnitSystem): SectionLoadPart {
  const weightLb = item.quantity * item.typicalLb
  return {
    id: item.id, label: item.name, weightLb, weightText: formatWeight(weightLb, system), ...place,
    state: verdict?.state ?? atticTone(attic),
    ratingShare: (verdict ? verdict.utilisation : attic.utilisation) ?? undefined,
  }
}

/** On hold or with no storage allowed, anything stored is over; without a survey nobody can tell. */
function atticTone(attic: AtticOfUnit): SectionLoadState {
  if (attic.loadState === null || attic.loadState === 'unsurveyed') return 'unknown'
  return attic.loadState === 'hold' ? 'over' : attic.loadState
}

const TONES: Record<Activity, SectionMarkPart['activity']> = { 'too-few-readings': 'unknown', 'dormant': 'dormant', 'watch': 'watch', 'active': 'active' }

function markPart(mark: MarkOfUnit, rooms: readonly PlacedRoom[]): SectionMarkPart {
  const room = rooms.find(({ id }) => id === mark.roomId)
  return {
    id: mark.id, kind: mark.kind, activity: TONES[mark.activity], widthClass: mark.widthClass ?? undefined,
    label: markValueWords(mark),
    name: `${MARK_KIND_WORDS[mark.kind]} ${mark.number}${room ? `, ${room.name}` : ''}`,
    positionShare: room ? room.from + room.share * mark.pinX : 0.5,
  }
}

/** The last reading in few letters; mm in both systems, because cracks are read in mm everywhere. */
export function markValueWords(mark: Pick<MarkOfUnit, 'kind' | 'lastValue' | 'stainState'>): string {
  if (mark.kind === 'stain' && mark.stainState) return mark.stainState
  if (mark.lastValue === null) return 'not read yet'
  return mark.kind === 'nail-pops' ? countWords(mark.lastValue, 'pop') : formatWidth(mark.lastValue, 'metric')
}
