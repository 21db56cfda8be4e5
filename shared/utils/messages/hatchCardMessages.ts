import type { HatchCardFacts, HatchCardField, HatchCardRow, PaperContact } from '../../types/paper'
import { formatDay } from '../days'
import { strictestRows } from '../papers/hatchCard'
import { formatLength, formatLoad, formatWeight, ftToM, type UnitSystem } from '../units'
import { ratingCautionSentence } from './ratingCautions'
import { ratingReasonSentence } from './ratingReasons'
import { ATTIC_WORK, ESTIMATE_CAVEAT, HOLD_CAUTION, NO_ATTIC_FOR_TENANTS, TRUSS_CAUTION, UNLOAD_FIRST } from './safety'

export interface HatchCardTable { caption: string, columns: string[], rows: { place: string, weights: string[] }[], notes: string[] }

/** The words around the drawing of one joist field. */
export interface HatchCardFieldText { number: number, title: string, joistCount: number, span: string, quarter: string, half: string }

/** Every sentence of a hatch card, the same on the printed sheet and on the screen. */
export interface HatchCardText {
  word: string
  /** Heavy outline and cross hatch: nothing may go up. */
  isBarred: boolean
  says: string
  why: string[]
  fields: HatchCardFieldText[]
  moreFields: string | null
  table: HatchCardTable | null
  noTable: string | null
  never: string[]
  cautions: string[]
  dates: string
  ask: string
}

export const FIELD_ZONE_WORDS = { wall: 'boxes here', middle: 'light things only' } as const

const NOTHING_UP = 'Put nothing up here.'

function verdictOf(facts: HatchCardFacts, system: UnitSystem): Pick<HatchCardText, 'word' | 'says'> {
  const rated = `At most ${formatLoad(facts.ratedPsf ?? 0, system)}, spread out.`
  switch (facts.state) {
    case 'unsurveyed': return { word: 'No storage', says: `${NOTHING_UP} Nobody has looked at these joists yet.` }
    case 'hold': return { word: 'On hold: no storage', says: `${NOTHING_UP} Suspended until the attic has been inspected.` }
    case 'no-storage': return { word: 'No storage', says: facts.isTrussed ? `${NOTHING_UP} These are trusses.` : NOTHING_UP }
    case 'over': return { word: 'Add nothing', says: `It holds more than it is rated for, or something stands where it cannot be judged. ${rated}` }
    case 'near': return { word: 'Nearly full', says: `${rated} Add nothing more before you have asked.` }
    case 'empty': case 'within': return { word: 'Light things only', says: rated }
  }
}

const fieldText = ({ number, name, spanFt, acrossFt, joistCount }: HatchCardField, system: UnitSystem): HatchCardFieldText => ({
  number, title: `${name}, seen from above`, joistCount, quarter: formatLength(spanFt / 4, system), half: formatLength(spanFt / 2, system),
  span: `${formatLength(spanFt, system)} from bearing wall to bearing wall · ${joistCount} joists over ${formatLength(acrossFt, system)}, not to scale`,
})

const fieldCaption = ({ name, ratedTotalLb }: HatchCardField, system: UnitSystem) => `${name}: all together at most ${formatWeight(ratedTotalLb, system)}`

const placeWords = (toFt: number, isLast: boolean, system: UnitSystem) => isLast ? 'out to the middle' : `up to ${formatLength(toFt, system)}`

/** More drawings than this would be too small; ours. */
const MOST_DRAWN = 2

/** More columns than this could not be read at arm's length: then the strictest figure of all fields stands for each. */
const MOST_COLUMNS = 2

/** A row that only repeats the next one further out is left away. */
const withoutRepeats = (rows: HatchCardTable['rows']) => rows.filter((row, index) => row.weights.join() !== rows[index + 1]?.weights.join())

function tableOf(facts: HatchCardFacts, system: UnitSystem): HatchCardTable | null {
  const fields = facts.fields.filter((field): field is HatchCardField & { rows: HatchCardRow[] } => field.rows !== null)
  if (fields.length === 0) return null
  const samePlaces = fields.length <= MOST_COLUMNS && fields.every(field => field.rows.length === fields[0]!.rows.length && field.rows.every((row, index) => Math.abs(row.toFt - fields[0]!.rows[index]!.toFt) < 1e-6))
  const columns = samePlaces ? fields.map(field => field.rows) : [strictestRows(fields)]
  const weight = ({ weightLb }: HatchCardRow) => formatWeight(weightLb, system)
  const side = system === 'us' ? `${Math.round(facts.boxSideFt * 12)} in` : `${Math.round(ftToM(facts.boxSideFt) * 100)} cm`
  return {
    caption: 'Heaviest single box, by how far its middle is from the nearer bearing wall',
    columns: samePlaces ? fields.map(field => field.name) : ['Every part of this attic'],
    rows: withoutRepeats(columns[0]!.map((row, index) => ({ place: placeWords(row.toFt, index === columns[0]!.length - 1, system), weights: columns.map(rows => weight(rows[index]!)) }))),
    notes: [
      `For one box, ${side} square or larger, alone on its joists. Nothing else may stand on them. In the middle half, nothing denser than the rating.`,
      ...fields.map(field => `${fieldCaption(field, system)}, spread out.`),
    ],
  }
}

function noTableOf(facts: HatchCardFacts): string | null {
  if (!facts.mayStore || facts.fields.some(field => field.rows)) return null
  return facts.isTrussed
    ? 'The paper on file speaks of a spread load. No figure for a single box can be given: ask its writer.'
    : 'No figure for a single box can be given before the joists are measured.'
}

/** Common practice (water, safes, tile, engines, what can burn); the rest follows from the load plan. */
const NEVER = [
  'Water: full heaters, tanks, water beds', 'Safes, engines, pianos', 'Tile, cement, brick, stone', 'Paint, fuel, gas, anything that burns easily',
  'Books, paper or tools in the middle half', 'Anything on the ceiling between joists',
]
const NEVER_ANYTHING = ['Boxes of any kind, light ones too', 'Anything on the ceiling between joists']

/** Said on the card in words of their own, or only of use to who reads the rating's reasons. */
const SAID_ELSEWHERE: readonly string[] = ['estimate-only', 'no-stamp-weakest-grade', 'bearing-length-assumed', 'southern-pine-lower-values', 'finish-taken-as-plaster', 'dead-load-floor', 'dead-load-part-assumed', 'few-joists-no-sharing', 'size-between-table-sizes', 'stands-over-ten-years', 'top-edge-unbraced', 'notched-within-limits', 'bored-within-limits']

function cautionsOf(facts: HatchCardFacts, system: UnitSystem): string[] {
  const isLoaded = facts.itemCount > 0
  return [
    ...facts.isTrussed ? [TRUSS_CAUTION] : [],
    ...facts.state === 'hold' ? [HOLD_CAUTION] : [],
    ...facts.state === 'over' || (facts.state === 'hold' && isLoaded) ? [UNLOAD_FIRST] : [],
    ...facts.cautions.filter(caution => !SAID_ELSEWHERE.includes(caution.code)).map(caution => ratingCautionSentence(caution, system)),
    `${ATTIC_WORK} ${NO_ATTIC_FOR_TENANTS}`, ESTIMATE_CAVEAT,
  ]
}

/** Reasons the caution beside them says already are not said twice. */
const whyOf = (facts: HatchCardFacts, system: UnitSystem) => facts.reasons.filter(reason => reason.code !== 'trusses').map(reason => ratingReasonSentence(reason, system))

export function hatchCardText(facts: HatchCardFacts, contact: PaperContact, system: UnitSystem, printedOn: string): HatchCardText {
  const stored = facts.itemCount > 0 ? `On that day it held about ${formatWeight(facts.storedLb, system)}.` : 'On that day nothing was stored.'
  return {
    ...verdictOf(facts, system), isBarred: !facts.mayStore, why: whyOf(facts, system),
    fields: facts.mayStore ? facts.fields.slice(0, MOST_DRAWN).map(field => fieldText(field, system)) : [],
    moreFields: facts.mayStore && facts.fields.length > MOST_DRAWN ? `Not drawn: ${facts.fields.slice(MOST_DRAWN).map(field => field.name).join(', ')}. The same zones hold there.` : null,
    table: tableOf(facts, system), noTable: noTableOf(facts),
    never: facts.mayStore ? NEVER : NEVER_ANYTHING,
    cautions: cautionsOf(facts, system),
    dates: `${facts.surveyedOn ? `Surveyed ${formatDay(facts.surveyedOn)}` : 'Never surveyed'}. Card of ${formatDay(printedOn)}. ${stored} A newer card replaces this one.`,
    ask: contact.phone ? `Ask first: ${contact.organisationName}, ${contact.phone}` : `Ask first: ${contact.organisationName}`,
  }
}
