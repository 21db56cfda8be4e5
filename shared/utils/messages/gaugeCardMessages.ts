import type { CheckUnit, GaugeCheck } from '../papers/gaugeCard'
import { formatShare } from '../units'
import { EMERGENCY_CALL, HANDS_OFF, LEAVE_ROOM, LEAVE_ROOM_SIGNS, NO_ATTIC_FOR_TENANTS } from './safety'

export const CHECK_WORDS: Record<CheckUnit, string> = { mm: '100 mm', in: '4 in' }

export const GAUGE_STEPS = [
  'Print at 100 % or “actual size”. Never “fit to page”.',
  'Lay a ruler on both check lines. They must be 100 mm and 4 in long. If not, throw this sheet away and print again.',
  'Cut out the card along the dashed line. The lines run out to its two long edges.',
  'Hold an edge of the card beside the crack, without pressing. Slide it until a line is just as wide as the crack.',
  'Read the number at that line, in mm. If it is between two, take the middle. Do it at three places, always the same ones.',
  'Note the number, the place and the day, and choose “printed gauge card” when you enter it.',
] as const

/** On the card itself, so that it goes with it when the rest of the sheet is gone. */
export const GAUGE_ON_CARD = 'Lathkey gauge card\nWidths in mm\nFeet on the floor\nNever under a sag'

export const GAUGE_NEVER = 'Use it only where you reach the mark with both feet on the floor. Never climb for it, and never stand under a sag or a bulge. A mark out of reach is judged by eye, or from a photo taken from the floor with zoom.'

export const GAUGE_CAUTIONS = [GAUGE_NEVER, `${HANDS_OFF} ${NO_ATTIC_FOR_TENANTS}`, `${LEAVE_ROOM} ${LEAVE_ROOM_SIGNS}`, EMERGENCY_CALL] as const

export const GAUGE_LIMIT = 'A reading with this card is good to about 0.2 mm (ours). It shows how a crack changes; it does not tell whether a ceiling is safe.'

/** What the answer about a check line means, and what to do. */
export function gaugeCheckSentence(check: GaugeCheck, unit: CheckUnit): string {
  switch (check.kind) {
    case 'true': return 'The card is true to size. Cut it out and use it.'
    case 'too-small': return `This card is too small: printed at ${formatShare(check.scale)} of its size, it would make every crack look wider. Do not use it. Print again at 100 %, without “fit to page”.`
    case 'too-large': return `This card is too large: printed at ${formatShare(check.scale)} of its size, it would make every crack look narrower. Do not use it. Print again at 100 %.`
    case 'not-that-line': return `That cannot be the ${CHECK_WORDS[unit]} line. Is it the other check line, or another unit? Do not use the card before one of them fits.`
  }
}
