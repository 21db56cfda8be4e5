import type { ContentState, JudgedContents } from '../../types/contents'
import { formatLoad, formatShare, formatWeight, type UnitSystem } from '../units'
import { LIMIT_WORDS } from './ratingReasons'

export const CONTENT_STATE_WORDS: Record<ContentState, string> = {
  'empty': 'Empty',
  'within': 'Within',
  'near': 'Near',
  'over': 'Over',
  'hold': 'On hold',
  'no-storage': 'No storage',
  'unsurveyed': 'Not surveyed',
}

const PLAN_LIMIT_WORDS = { ...LIMIT_WORDS, moment: LIMIT_WORDS.bending }

/** An attic's state as a verdict: word, number, why, and the one thing to do. */
export interface ContentsVerdict { word: string, says: string, number: string | null, why: string, doNow: string | null }

const stored = (contents: JudgedContents, system: UnitSystem) =>
  `about ${formatWeight(contents.totalLb, system)} (most likely between ${formatWeight(contents.lowLb, system)} and ${formatWeight(contents.highLb, system)})`

function loadedVerdict(contents: JudgedContents, system: UnitSystem): ContentsVerdict {
  const { worstJoist, ratedTotalLb, utilisation, state } = contents
  const word = CONTENT_STATE_WORDS[state]
  const whole = ratedTotalLb === null
    ? `Stored here: ${stored(contents, system)}. The joists are not measured, so the whole cannot be held against the rating.`
    : `Stored here: ${stored(contents, system)} of ${formatWeight(ratedTotalLb, system)} rated.`
  const doNow = state === 'over'
    ? 'Stop adding. Move the heaviest things to the bearing walls or out of the attic.'
    : contents.heavyInMiddle.length > 0
      ? 'Move what is denser than the rating out of the middle half of the span.'
      : state === 'near' ? 'Add nothing more before you weigh what was guessed.' : null
  if (worstJoist && worstJoist.utilisation >= (utilisation ?? 0)) {
    return { word, says: `: joist ${worstJoist.joistNumber} carries`, number: `${formatShare(worstJoist.utilisation)} of its rating`, why: `${PLAN_LIMIT_WORDS[worstJoist.limit]} decides on joist ${worstJoist.joistNumber} of ${worstJoist.fieldName}. ${whole}`, doNow }
  }
  return { word, says: ': the attic carries', number: utilisation === null ? null : `${formatShare(utilisation)} of its rating`, why: whole, doNow }
}

/** The verdict of an attic in words. */
export function contentsVerdict(contents: JudgedContents, system: UnitSystem = 'us'): ContentsVerdict {
  const word = CONTENT_STATE_WORDS[contents.state]
  const isLoaded = contents.itemCount > 0
  switch (contents.state) {
    case 'unsurveyed': return {
      word, says: isLoaded ? ', and loaded with' : ': nobody has looked at the joists yet.', number: isLoaded ? formatWeight(contents.totalLb, system) : null,
      why: 'Without a survey nobody knows what this attic may hold.', doNow: isLoaded ? 'Stop adding and survey the attic.' : 'Survey the attic before anything goes up.',
    }
    case 'hold': return {
      word, says: isLoaded ? 'while loaded with' : ': nothing may be stored until it is inspected.', number: isLoaded ? formatWeight(contents.totalLb, system) : null,
      why: 'Members were seen that may not carry what they should.', doNow: isLoaded ? 'Unload it, then have it inspected.' : 'Have it inspected.',
    }
    case 'no-storage': return {
      word, says: isLoaded ? 'is allowed here, yet it holds' : 'is allowed here.', number: isLoaded ? formatWeight(contents.totalLb, system) : null,
      why: 'The rating for stored goods is 0.', doNow: isLoaded ? 'Take everything out.' : null,
    }
    case 'empty': return { word, says: ': nothing is stored here.', number: null, why: `It is rated ${formatLoad(contents.rating?.ratedPsf ?? 0, system)}.`, doNow: null }
    default: return loadedVerdict(contents, system)
  }
}
