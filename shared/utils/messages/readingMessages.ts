import type { MarkKind } from '../../types/mark'
import { READING_QUANTITIES } from '../../types/mark'
import type { ReadingRefusal } from '../movement/measureReading'
import type { SizeRefusal } from '../movement/readingSize'
import { MOST_VALUE } from '../movement/measureReading'
import { formatDay } from '../days'
import { formatNumber, formatWidth, NO_BREAK_SPACE, type UnitSystem } from '../units'
import { countWords } from './activityMessages'

/** '1.2 mm (0.047 in)', '7 pops'. */
export function readingWords(kind: MarkKind, value: number, system: UnitSystem = 'us'): string {
  return READING_QUANTITIES[kind].unit === 'pops' ? countWords(value, 'pop') : formatWidth(value, system)
}

/** As read from a coin or card: 'between 0.76 and 1.35 mm', 'more than 12 mm'; otherwise the value alone. */
export function readingRangeWords(kind: MarkKind, reading: { value: number, low: number | null, high: number | null }, system: UnitSystem = 'us'): string {
  if (reading.low === null) return readingWords(kind, reading.value, system)
  if (reading.high === null) return `more than ${readingWords(kind, reading.low, system)}`
  return `between ${formatNumber(reading.low, 2)} and ${formatNumber(reading.high, 2)}${NO_BREAK_SPACE}mm`
}

export function refusedReadingSentence(kind: MarkKind, why: ReadingRefusal | SizeRefusal): string {
  switch (why) {
    case 'method-does-not-suit': return 'That way of measuring does not suit this kind of mark.'
    case 'value-missing': return kind === 'nail-pops' ? 'How many bumps do you count?' : 'Please give the size in millimetres, or say that it could not be measured.'
    case 'value-out-of-range': return `Please give a number from 0 to ${readingWords(kind, MOST_VALUE[kind], 'metric')}.`
    case 'count-not-whole': return 'Count whole bumps, please.'
    case 'range-not-here': return 'Thicker than and thinner than go with coins and cards on a crack.'
    case 'second-not-here': return 'A second reading goes with one plain number of the same kind.'
    case 'photo-not-here': return 'Points in a photo go with the method “Photo with a scale in it”.'
    case 'photo-too-few-stations': return 'Measure across it at three places or more.'
    case 'photo-scale-unsound': return 'The two points of the scale are too close together. Zoom out, or take the photo closer.'
    case 'photo-point-outside': return 'One of the points is outside the photo.'
    case 'since-set-not-here': return 'A setting goes with calipers on pins or a tell-tale.'
    case 'since-set-below-zero': return 'With these numbers the width would be below 0 or beyond belief. Please look at them again.'
    case 'check-ruler-not-here': return 'The check line goes with the printed gauge card.'
    case 'card-misprinted': return 'The check line has to be 100 mm long, to one in a hundred. This card was printed at a wrong size: do not use it, print it again at 100 %.'
    case 'range-upside-down': return 'The thicker one must be thicker than the thinner one.'
  }
}

export function askAgainSentence(kind: MarkKind, value: number, usual: number, system: UnitSystem = 'us'): string {
  return `You wrote ${readingWords(kind, value, system)}. Before it was about ${readingWords(kind, usual, system)}. Is the new one right? Then send it once more.`
}

export function pairSentence(kind: MarkKind, first: number, second: number, system: UnitSystem = 'us'): string {
  return `The two readings are ${readingWords(kind, first, system)} and ${readingWords(kind, second, system)}: far apart for one size. Are both right? Then send them once more.`
}

export function otherDaySentence(cameraOn: string, takenOn: string): string {
  return `The camera says the photo is of ${formatDay(cameraOn)}, you say ${formatDay(takenOn)}. Which day was it measured? Both stay on record.`
}
