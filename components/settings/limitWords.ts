import type { LimitName } from '~/shared/types/limits'

/** What each limit of the movement rules decides, in plain words. */
export const LIMIT_WORDS: Record<LimitName, { label: string, hint: string }> = {
  seasonAllowanceMm: { label: 'What a season may open', hint: 'Before a year of readings exists, a rise has to exceed this.' },
  trussAllowanceMm: { label: 'The same at inner wall corners under trusses', hint: 'Trusses lift in winter; gaps up to ¾ in are published.' },
  leastReadings: { label: 'Fewest readings', hint: 'Before so many, nothing is said of a trend.' },
  leastDays: { label: 'Shortest time', hint: 'From the first reading to the last.' },
  pRising: { label: 'Chance of a false alarm in one look', hint: 'Smaller asks for more certainty before a crack counts as active.' },
  dormantWithinMmPerYear: { label: 'Dormant means within', hint: 'A mark rests when its rate surely stays within this, either way.' },
  leastJumpMm: { label: 'Smallest sudden jump', hint: 'Above the readings before it.' },
  jumpSigmas: { label: 'A jump in uncertainties', hint: 'And at least so many times the reading’s own uncertainty.' },
  morePops: { label: 'More nail pops', hint: 'So many more than at the least count are growth.' },
}
