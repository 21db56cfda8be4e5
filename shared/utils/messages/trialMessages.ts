import type { MarkKind } from '../../types/mark'
import { formatDay } from '../days'
import type { MeasuredTrial, TrialWithoutAnswer, UnloadTrialResult } from '../movement/unloadTrial'
import { formatNumber, NO_BREAK_SPACE, type UnitSystem } from '../units'
import { countWords, rateWords } from './activityMessages'

/** Shown with every result of a trial. */
export const TRIAL_CAVEAT = 'A trial shows what moved together. It proves no cause, and it never says that a ceiling is safe.'
/** Shown first while a trial is only planned and the attic is over, on hold or under an urgent finding. */
export const UNLOAD_NOW = 'Do not wait for the trial. Unloading comes before measuring: stop adding, and move the heaviest things to the bearing walls or out.'

export const TRIAL_VERDICT_WORDS: Record<MeasuredTrial['verdict'], string> = {
  'slowed': 'It moved more slowly after the unloading.', 'quickened': 'It moved faster after the unloading.',
  'no-change': 'No change of its rate was seen.', 'cannot-tell': 'Cannot tell yet whether its rate changed.',
}

const LEVEL_WORDS: Record<MarkKind, { closed: string, opened: string }> = {
  'crack': { closed: 'It closed by', opened: 'It opened by' }, 'sag': { closed: 'It rose by', opened: 'It dropped by' },
  'nail-pops': { closed: 'Fewer pops by', opened: 'More pops by' }, 'stain': { closed: 'It shrank by', opened: 'It spread by' },
}

const sizeWords = (kind: MarkKind, size: number) => `${formatNumber(size, kind === 'nail-pops' ? 0 : 2)}${NO_BREAK_SPACE}${kind === 'nail-pops' ? 'pops' : 'mm'}`

function withoutAnswer({ missingBefore, missingAfter, moreReadings, tellsOn }: TrialWithoutAnswer): string {
  if (moreReadings === null) return `${countWords(missingBefore, 'reading')} before the unloading ${missingBefore === 1 ? 'is' : 'are'} missing and cannot be taken any more, so this mark will not tell.`
  const sides = [missingBefore > 0 ? `${formatNumber(missingBefore)} before` : '', missingAfter > 0 ? `${formatNumber(missingAfter)} after` : ''].filter(Boolean).join(' and ')
  return `Cannot tell yet. ${countWords(moreReadings, 'more reading', 'more readings')} needed, ${sides} the unloading${tellsOn ? `: about ${formatDay(tellsOn)}, one in two weeks` : ''}.`
}

function rateSentence({ slopeBefore, slopeAfter, slopeChange }: MeasuredTrial, kind: MarkKind, system: UnitSystem): string {
  const [low, high] = slopeChange.interval
  return `About ${rateWords(kind, slopeBefore.value, system)} before, ${rateWords(kind, slopeAfter.value, system)} after; the change lies between ${rateWords(kind, low, system)} and ${rateWords(kind, high, system)}.`
}

function levelSentence({ levelVerdict, levelStep }: MeasuredTrial, kind: MarkKind): string {
  if (levelVerdict === 'no-step-seen') return ''
  const [near, far] = levelStep.interval.map(Math.abs).sort((a, b) => a - b) as [number, number]
  return ` ${LEVEL_WORDS[kind][levelVerdict]} ${sizeWords(kind, near)} to ${sizeWords(kind, far)} on the day.`
}

function moreSentence({ verdict, moreReadings, tellsOn }: MeasuredTrial): string {
  if (verdict !== 'cannot-tell') return ''
  if (moreReadings === null || tellsOn === null) return ' With readings as coarse as these no number of them would tell; a sharper method would.'
  return ` ${countWords(moreReadings, 'more reading', 'more readings')}, one in two weeks, would tell: about ${formatDay(tellsOn)}.`
}

/** How one watched mark answered the trial, in words, with its uncertainty. */
export function trialSentence(result: UnloadTrialResult, kind: MarkKind, system: UnitSystem = 'us'): string {
  if (result.kind === 'cannot tell yet') return withoutAnswer(result)
  const season = result.seasonRuledOutFrom === null ? '' : ` A season cannot be ruled out before ${formatDay(result.seasonRuledOutFrom)}.`
  return `${TRIAL_VERDICT_WORDS[result.verdict]} ${rateSentence(result, kind, system)}${levelSentence(result, kind)}${moreSentence(result)}${season}`
}
