import type { ReadingMethod } from '../../types/mark'

/** One line each: how to do it, from the floor. */
export const METHOD_HOW_TO: Record<ReadingMethod, string> = {
  'guess': 'Look from the floor and say the size. It is the least sure way, and better than nothing.',
  'coin-or-card': 'Compare with a card and coins, where you reach it standing on the floor. Say what it is wider than and what it is narrower than.',
  'ruler': 'Lay a ruler square across the widest place, where you reach it standing on the floor.',
  'photo-with-scale': 'From a photo with something of known size beside it, camera square on: the size worked out from it.',
  'gauge-card': 'Hold the printed card beside it and find the line of the same thickness.',
  'tell-tale': 'Read the tell-tale that is fixed across it.',
  'calipers': 'Measure between the two pins with calipers.',
  'count': 'Count every bump you can see from the floor.',
  'string-line': 'Somebody who knows how stretches a string from end to end and measures down to the lowest point.',
}
