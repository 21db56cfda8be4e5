import type { AtticOfUnit, MarkOfUnit, RoomFacts, UnitLoadState, UnitStatusFacts } from '../../types/home'
import type { Activity } from '../../types/mark'
import { formatDay } from '../days'
import type { UnitSystem } from '../units'
import { ACTIVITY_WORDS, countWords, rateWords } from './activityMessages'
import { MARK_KIND_WORDS } from './markMessages'

export type VerdictTone = 'within' | 'near' | 'over' | 'dormant' | 'watch' | 'active' | 'unknown'
export interface VerdictWords { word: string, tone: VerdictTone, says: string, number?: string, after?: string, why: string }

const LOAD_WORDS: Record<UnitLoadState, { word: string, tone: VerdictTone }> = {
  within: { word: 'Within', tone: 'within' }, near: { word: 'Near', tone: 'near' }, over: { word: 'Over', tone: 'over' },
  hold: { word: 'On hold', tone: 'over' }, unsurveyed: { word: 'Not surveyed', tone: 'unknown' },
}

/** What a list says of the attics of a unit: the worst of them. */
export function atticWord(status: Pick<UnitStatusFacts, 'loadState' | 'atticCount'>): { word: string, tone: VerdictTone } {
  if (status.atticCount === 0) return { word: 'No attic entered', tone: 'unknown' }
  return LOAD_WORDS[status.loadState ?? 'unsurveyed']
}

/** What a list says of the ceilings of a unit. */
export function ceilingWord({ openMarks, activeMarks }: Pick<UnitStatusFacts, 'openMarks' | 'activeMarks'>): { word: string, tone: VerdictTone } {
  if (activeMarks > 0) return { word: `Active: ${activeMarks}`, tone: 'active' }
  return openMarks > 0 ? { word: `Marks followed: ${openMarks}`, tone: 'watch' } : { word: 'No marks', tone: 'unknown' }
}

const GRAVITY: Record<Activity, number> = { 'active': 3, 'watch': 2, 'too-few-readings': 1, 'dormant': 0 }
const TONES: Record<Activity, VerdictTone> = { 'active': 'active', 'watch': 'watch', 'too-few-readings': 'unknown', 'dormant': 'dormant' }

/** Open marks, those that move first. */
export function marksByGravity(marks: readonly MarkOfUnit[]): MarkOfUnit[] {
  return marks.filter(mark => mark.state === 'open')
    .sort((a, b) => GRAVITY[b.activity] - GRAVITY[a.activity] || (b.slopePerYear ?? 0) - (a.slopePerYear ?? 0) || a.number - b.number)
}

export function markName(mark: Pick<MarkOfUnit, 'kind' | 'number' | 'roomId'>, rooms: readonly Pick<RoomFacts, 'id' | 'name'>[]): string {
  const room = rooms.find(({ id }) => id === mark.roomId)
  return `${MARK_KIND_WORDS[mark.kind]} ${mark.number}${room ? `, ${room.name}` : ''}`
}

/** One word, one number and the reason for the ceilings of a unit: the mark that most needs a look speaks for all. */
export function ceilingVerdict(marks: readonly MarkOfUnit[], rooms: readonly Pick<RoomFacts, 'id' | 'name'>[], system: UnitSystem = 'us'): VerdictWords {
  const [worst, ...others] = marksByGravity(marks)
  if (!worst) return { word: 'No marks', tone: 'unknown', says: ': no mark is being followed on these ceilings.', why: 'A mark is a crack, a group of nail pops, a sag or a stain that somebody reported.' }
  const rest = others.length === 0 ? '' : ` ${countWords(others.length, 'more mark')} followed.`
  const read = worst.lastReadOn ? `Last read on ${formatDay(worst.lastReadOn)}.` : 'Not read yet.'
  const due = worst.nextReadingOn ? ` Next reading ${formatDay(worst.nextReadingOn)}.` : ''
  const head = { word: ACTIVITY_WORDS[worst.activity], tone: TONES[worst.activity], why: `${read}${due}${rest}` }
  const name = markName(worst, rooms)
  if (worst.activity === 'dormant') return { ...head, says: `: ${name} has kept still for a year or more.` }
  if (worst.activity === 'too-few-readings') return { ...head, says: `: we cannot tell yet whether ${name} moves.` }
  if (worst.slopePerYear === null) return { ...head, says: `: ${name} is being followed.` }
  return { ...head, says: `: ${name} changes by about`, number: `${rateWords(worst.kind, worst.slopePerYear, system)}.` }
}

/** The last day anybody looked, and at what; undefined when nobody has. */
export function lastLook(attics: readonly AtticOfUnit[], marks: readonly MarkOfUnit[]): { on: string, at: 'attic' | 'ceiling' } | undefined {
  const attic = attics.flatMap(({ surveyedOn, inventoryConfirmedOn }) => [surveyedOn, inventoryConfirmedOn]).filter(on => on !== null).sort().at(-1)
  const ceiling = marks.map(mark => mark.lastReadOn).filter(on => on !== null).sort().at(-1)
  if (attic === undefined && ceiling === undefined) return undefined
  return attic !== undefined && (ceiling === undefined || attic >= ceiling) ? { on: attic, at: 'attic' } : { on: ceiling!, at: 'ceiling' }
}

export const CEILING_FINISH_WORDS = {
  'gypsum-half-inch': '½ in gypsum board', 'gypsum-five-eighths': '⅝ in gypsum board', 'plaster-on-lath': 'plaster on lath',
  'wood-boards': 'wood boards', 'other': 'something else', 'unknown': 'not known',
} as const
