import type { MarkChartData } from './markChartSeries'
import { activityTone } from './activityTone'
import type { MarkTone } from '../house/sectionTypes'
import type { MarkPage } from '#shared/types/markPage'
import { ACTIVITY_WORDS, rateWords } from '#shared/utils/messages/activityMessages'
import { movementSentence } from '#shared/utils/messages/movementSentence'
import { widthClass } from '#shared/utils/movement/widthClass'
import { DIRECTION_WORDS, MARK_KIND_WORDS, MARK_PLACE_WORDS, MARK_SHAPE_WORDS, STAIN_STATE_WORDS, widthClassSentence } from '#shared/utils/messages/markMessages'
import { readingWords } from '#shared/utils/messages/readingMessages'
import { formatDay } from '#shared/utils/days'
import type { UnitSystem } from '#shared/utils/units'

/** The readings that have a number, repairs as breaks, and the load above, as the chart and its table take them. */
export function chartDataOf({ readings, trend, loadSteps, repairs }: Pick<MarkPage, 'readings' | 'trend' | 'loadSteps' | 'repairs'>): MarkChartData {
  return {
    readings: readings.flatMap(({ takenOn, value, sigma, segment }) => value !== null && sigma !== null ? [{ takenOn, value, sigma, segment }] : []),
    trend: trend.kind === 'measured' ? trend : null,
    repairs: repairs.map(({ repairedOn }) => ({ on: repairedOn, label: 'Repair' })),
    suddenOn: trend.sudden?.takenOn ?? null,
    loadSteps: loadSteps.map(step => ({ on: step.on, weightLb: step.totalLb })),
  }
}

export interface MarkVerdictWords { word: string, tone: MarkTone, says: string, number?: string, why: string, doNow?: string }

/** One word, one number, one sentence why, one thing to do. */
export function markVerdict({ mark, trend, today, loadLinks }: Pick<MarkPage, 'mark' | 'trend' | 'today' | 'loadLinks'>, system: UnitSystem): MarkVerdictWords {
  const due = mark.nextReadingOn
  const doNow = mark.state === 'closed' || !due ? undefined : due < today ? `A reading was due on ${formatDay(due)}. Take it, or say that it cannot be taken.` : `Next reading ${formatDay(due)}.`
  const why = movementSentence(trend, loadLinks, mark.kind, system, today)
  if (mark.joinedInto) return { word: 'Joined', tone: 'unknown', says: ': it counts as part of another mark.', why: 'Its readings, photos and reports stand there.' }
  if (mark.state === 'closed') return { word: 'Closed', tone: 'unknown', says: ': this mark is no longer followed.', why }
  if (mark.state === 'repaired') return { word: 'Repaired', tone: 'unknown', says: ': readings start anew. What was there before stays on record.', why, doNow }
  if (trend.sudden && mark.activity !== 'active') return { word: 'Sudden', tone: 'active', says: ': the newest reading jumped to', number: `${readingWords(mark.kind, trend.sudden.value, system)}.`, why, doNow }
  const head = { word: ACTIVITY_WORDS[mark.activity], tone: activityTone(mark.activity), why, doNow }
  if (trend.kind !== 'measured') return { ...head, says: ': we cannot tell yet whether it moves.' }
  if (trend.activity === 'dormant') return { ...head, says: ': it has kept still for a year or more.' }
  return { ...head, says: ': it changes by about', number: `${rateWords(mark.kind, trend.slopePerYear, system)}.` }
}

/** The class of a crack's width with its caveat; nothing for other kinds. */
export const widthClassWords = ({ kind, lastValue }: Pick<MarkPage['mark'], 'kind' | 'lastValue'>): string | null =>
  kind === 'crack' && lastValue !== null ? widthClassSentence(widthClass(lastValue)) : null

/** The ruled box of facts at the head of a mark's page; what nobody said is left out. */
export function markFacts({ mark, room, unit, property, attic }: Pick<MarkPage, 'mark' | 'room' | 'unit' | 'property' | 'attic'>, system: UnitSystem): { label: string, value: string, main?: boolean }[] {
  return [
    { label: MARK_KIND_WORDS[mark.kind], value: `${mark.number}: ${mark.label}`, main: true },
    { label: 'Home', value: `${property.name}, ${unit.name}` },
    { label: 'Room', value: room.name },
    { label: 'Last reading', value: mark.lastValue === null ? 'not measured' : readingWords(mark.kind, mark.lastValue, system) },
    { label: 'First seen', value: formatDay(mark.firstSeenOn) },
    { label: 'Above it', value: attic?.name ?? 'no attic entered' },
    ...mark.shape ? [{ label: 'Most like', value: MARK_SHAPE_WORDS[mark.shape] }] : [],
    ...mark.place ? [{ label: 'Where', value: MARK_PLACE_WORDS[mark.place] }] : [],
    ...mark.direction && mark.direction !== 'not-known' ? [{ label: 'It runs', value: DIRECTION_WORDS[mark.direction] }] : [],
    ...mark.stainState ? [{ label: 'Damp', value: STAIN_STATE_WORDS[mark.stainState] }] : [],
  ]
}
