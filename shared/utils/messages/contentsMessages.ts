import type { ContentState, JudgedContents } from '../../types/contents'
import { formatLoad, formatShare, formatWeight, type UnitSystem } from '../units'
import { CHANCE_LIMIT } from '../upkeep/findAtticFindings'
import { chanceSentence } from './goodsMessages'
import { PLAN_LIMIT_WORDS } from './planMessages'

export const CONTENT_STATE_WORDS: Record<ContentState, string> = {
  'empty': 'Empty',
  'within': 'Within',
  'near': 'Near',
  'over': 'Over',
  'hold': 'On hold',
  'no-storage': 'No storage',
  'unsurveyed': 'Not surveyed',
}

/** An attic's state as a verdict: word, number, why, whether it is to be unloaded first, and the one thing to do then. */
export interface ContentsVerdict { word: string, says: string, number: string | null, why: string, unloadFirst: boolean, doNow: string | null }

const stored = (contents: JudgedContents, system: UnitSystem) =>
  `about ${formatWeight(contents.totalLb, system)} (most likely between ${formatWeight(contents.lowLb, system)} and ${formatWeight(contents.highLb, system)})`

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

const isPartMeasured = ({ fields }: JudgedContents) => fields.some(field => field.plan === null)

function loadedWhy(contents: JudgedContents, system: UnitSystem): string {
  const { ratedTotalLb, chanceOfExceeding: chance } = contents
  const sentences = [`Stored here: ${stored(contents, system)}${ratedTotalLb === null ? '' : ` of ${formatWeight(ratedTotalLb, system)} rated`}.`]
  if (chance !== null && chance > CHANCE_LIMIT) sentences.push(chanceSentence(chance))
  return sentences.join(' ')
}

function doNowOf(contents: JudgedContents): string | null {
  if (contents.state === 'over') return null
  if (contents.heavyInMiddle.length > 0) return 'Move what is denser than the rating out of the middle half of the span.'
  if (contents.state !== 'near') return null
  return isPartMeasured(contents) ? 'Add nothing more before all joists are measured.' : 'Add nothing more before you weigh what was guessed.'
}

/** Where nothing can be worked out, or something stands where it cannot be judged. */
function unjudgedVerdict(contents: JudgedContents, system: UnitSystem): ContentsVerdict {
  const word = CONTENT_STATE_WORDS[contents.state]
  const whole = loadedWhy(contents, system)
  if (contents.outside.length > 0) {
    const count = contents.outside.length
    return {
      word, says: ': something stands outside the measured joists.', number: null, unloadFirst: false,
      why: `${count === 1 ? 'One item is' : `${count} items are`} entered where no joist was measured, so the load there cannot be judged. ${whole}`,
      doNow: 'Add nothing. Correct where it stands, or measure the joists under it.',
    }
  }
  const isJoisted = contents.rating?.joistCheck !== undefined || contents.fields.length > 0
  return {
    word, says: isJoisted ? ': the joists are not measured.' : ': this framing is never calculated.', number: null, unloadFirst: false,
    why: `So the load cannot be held against the rating of ${formatLoad(contents.rating?.ratedPsf ?? 0, system)}. ${whole}`,
    doNow: isJoisted ? 'Add nothing more before the joists are measured.' : 'Hold every load against the paper on file, and ask its writer before anything more goes up.',
  }
}

function loadedVerdict(contents: JudgedContents, system: UnitSystem): ContentsVerdict {
  const { worstJoist, utilisation, state } = contents
  const word = CONTENT_STATE_WORDS[state]
  const isJudged = utilisation !== null && Number.isFinite(utilisation) && contents.outside.length === 0 && (state !== 'over' || utilisation > 1)
  if (!isJudged) return unjudgedVerdict(contents, system)
  const why = `${loadedWhy(contents, system)}${isPartMeasured(contents) ? ' Not all joists are measured.' : ''}`
  const doNow = doNowOf(contents)
  const unloadFirst = state === 'over'
  const number = `${formatShare(utilisation)} of ${worstJoist && worstJoist.utilisation >= utilisation ? 'its' : 'the'} rating`
  if (worstJoist && worstJoist.utilisation >= utilisation) {
    const { joistNumber, fieldName, limit } = worstJoist
    return { word, says: `: joist ${joistNumber} carries`, number, why: `${capital(PLAN_LIMIT_WORDS[limit])} decides, on joist ${joistNumber} of ${fieldName}. ${why}`, unloadFirst, doNow }
  }
  return { word, says: ': the attic carries', number, why, unloadFirst, doNow }
}

/** The verdict of an attic in words. */
export function contentsVerdict(contents: JudgedContents, system: UnitSystem = 'us'): ContentsVerdict {
  const word = CONTENT_STATE_WORDS[contents.state]
  const isLoaded = contents.itemCount > 0
  const number = isLoaded ? formatWeight(contents.totalLb, system) : null
  switch (contents.state) {
    case 'unsurveyed': return {
      word, number, says: isLoaded ? ', and loaded with' : ': nobody has looked at the joists yet.',
      why: 'Without a survey nobody knows what this attic may hold.', unloadFirst: false, doNow: isLoaded ? 'Stop adding and survey the attic.' : 'Survey the attic before anything goes up.',
    }
    case 'hold': return {
      word, number, says: isLoaded ? 'while loaded with' : ': nothing may be stored until it is inspected.',
      why: 'Members were seen that may not carry what they should.', unloadFirst: isLoaded, doNow: isLoaded ? 'Then have the attic inspected.' : 'Have it inspected.',
    }
    case 'no-storage': return {
      word, number, says: isLoaded ? 'is allowed here, yet it holds' : 'is allowed here.',
      why: `The rating for stored goods is ${formatLoad(0, system)}.`, unloadFirst: false, doNow: isLoaded ? 'Take everything out.' : null,
    }
    case 'empty': return { word, says: ': nothing is stored here.', number: null, unloadFirst: false, why: `It is rated ${formatLoad(contents.rating?.ratedPsf ?? 0, system)}.`, doNow: null }
    default: return loadedVerdict(contents, system)
  }
}
