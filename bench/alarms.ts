import { HABITS, shareEverActive, SIGMA_MM, type InventedMovement } from '../tests/unit/movement/inventedMarks.ts'

const SERIES = 2000
const SEED = 77

/** By the reading of this month; the first is month 0. */
const CASES: { name: string, movement: InventedMovement, lastMonth: number, wanted: string }[] = [
  { name: 'no movement, 24 looks', movement: { perYear: 0, seasonPeakToPeak: 0 }, lastMonth: 23, wanted: '≤ 3 %' },
  { name: '1 mm season, no growth, 24 looks', movement: { perYear: 0, seasonPeakToPeak: 1 }, lastMonth: 23, wanted: '≤ 3 %' },
  { name: '1.5 mm season, no growth, 24 looks', movement: { perYear: 0, seasonPeakToPeak: 1.5 }, lastMonth: 23, wanted: '' },
  { name: '2 mm season, no growth, 24 looks', movement: { perYear: 0, seasonPeakToPeak: 2 }, lastMonth: 23, wanted: '' },
  { name: '2 mm a year on a 1 mm season, by month 14', movement: { perYear: 2, seasonPeakToPeak: 1 }, lastMonth: 14, wanted: '≥ 95 %' },
  { name: '6 mm a year on a 1 mm season, by month 8', movement: { perYear: 6, seasonPeakToPeak: 1 }, lastMonth: 8, wanted: '≥ 95 %' },
  { name: 'closing 3 mm a year, 24 looks', movement: { perYear: -3, seasonPeakToPeak: 1 }, lastMonth: 23, wanted: '' },
]

const shareOf = (movement: InventedMovement, lastMonth: number, habit: typeof HABITS[string]) =>
  `${(100 * shareEverActive(movement, { months: lastMonth + 1, series: SERIES, seed: SEED, habit })).toFixed(1)} %`

console.log([
  '# How often the activity rule calls an invented mark active', '',
  `${SERIES} series a cell, monthly readings, σ ${SIGMA_MM} mm, a look at every reading, seed ${SEED}. What is asked holds for readings as measured; the other columns are shown beside. A mistyped reading is ten times too large or small, and nobody was asked about it.`, '',
  `| | asked | ${Object.keys(HABITS).join(' | ')} |`,
  `|---|---|${Object.keys(HABITS).map(() => '---:').join('|')}|`,
  ...CASES.map(({ name, movement, lastMonth, wanted }) => `| ${[name, wanted, ...Object.values(HABITS).map(habit => shareOf(movement, lastMonth, habit))].join(' | ')} |`),
].join('\n'))
