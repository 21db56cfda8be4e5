import type { AtticSurvey, CeilingFinish, JoistField } from '../../shared/types/attic'
import { emptyJoistField, emptySurvey } from '../../shared/utils/attic/emptySurvey'
import type { MarkKind, MarkPlace, MarkShape } from '../../shared/types/mark'

/**
 * The demo portfolio: people, homes and events of our own invention, evidently so (`.example` addresses).
 * Days are counted back from today, so that every screen has something to show whenever it is seeded.
 */

export interface DemoPerson { key: string, name: string, email: string, role: 'owner' | 'manager' | 'tenant' | 'trades' | 'engineer' }

export const ORGANISATION = { name: 'Quillbrook Lettings (invented)', timeZone: 'America/New_York', contactPhone: '+1 555 0100' }

export const PEOPLE: DemoPerson[] = [
  { key: 'maren', name: 'Maren Quillbrook', email: 'maren@quillbrook.example', role: 'owner' },
  { key: 'otis', name: 'Otis Fennimore', email: 'otis@quillbrook.example', role: 'manager' },
  { key: 'pia', name: 'Pia Sandgren', email: 'pia@quillbrook.example', role: 'manager' },
  { key: 'tomas', name: 'Tomas Ilves', email: 'tomas@tenants.example', role: 'tenant' },
  { key: 'wanda', name: 'Wanda Okonjo', email: 'wanda@tenants.example', role: 'tenant' },
  { key: 'ruben', name: 'Ruben Achterberg', email: 'ruben@tenants.example', role: 'tenant' },
  { key: 'ilse', name: 'Ilse Marchetti', email: 'ilse@tenants.example', role: 'tenant' },
  { key: 'bram', name: 'Bram Tollison', email: 'bram@plaster.example', role: 'trades' },
  { key: 'ines', name: 'Ines Calderwood', email: 'ines@structures.example', role: 'engineer' },
]

/** Movement a mark shows: at rest, breathing with the seasons, growing, or jumping near the end. */
export type Pattern = 'still' | 'season' | 'slow' | 'fast' | 'jump'

export interface DemoMark {
  room: number
  kind: MarkKind
  shape: MarkShape
  place: MarkPlace
  startMm: number
  pattern: Pattern
  readings: number
  /** Days back when it was first reported. */
  sinceDaysAgo: number
  /** Days since the last reading; a larger number leaves the next one late. */
  lastDaysAgo: number
  danger?: true
  repairedDaysAgo?: number
  stain?: 'dry' | 'damp' | 'dripping'
}

export interface DemoItem { find: string, quantity: number, field?: number, xFt: number, yFt: number, daysAgo: number, weighedLb?: number, tenantOwns?: true, removedDaysAgo?: number }
export interface DemoAttic { name: string, survey: AtticSurvey | null, items: DemoItem[], confirmedDaysAgo?: number, surveyAgainDaysAgo?: number }
export interface DemoUnit { name: string, rooms: { name: string, isBedroom?: true, lengthFt: number, widthFt: number }[], attic?: DemoAttic, marks: DemoMark[], tenant?: string, tenantName?: string, engineer?: string, finish?: CeilingFinish }
export interface DemoProperty { name: string, addressLines: string[], yearBuilt: number, units: DemoUnit[] }

const joists = (name: string, measures: Partial<JoistField>): JoistField => ({ ...emptyJoistField(name), bothEndsBear: true, ...measures })

/** What was told of it on the first day, before anybody had looked closely. */
export const firstLook = (survey: AtticSurvey): AtticSurvey => ({
  ...survey, ...survey.deckAreaFt2 !== undefined && { deckAreaFt2: null }, conditions: null,
  joistFields: survey.joistFields.map(field => ({ ...field, bothEndsBear: undefined })),
})

/** Rafters and joists with a way in that counts as storage. */
export const openAttic = (fields: JoistField[], answers: Partial<AtticSurvey> = {}): AtticSurvey => ({
  ...emptySurvey(''), framing: 'rafters-and-joists', access: 'pull-down-ladder', openingWidthIn: 24, openingLengthIn: 54, clearHeightIn: 60, habitable: false,
  ceilingFinish: 'gypsum-half-inch', insulation: { material: 'fiberglass', depthIn: 6 }, deck: 'partial', deckAreaFt2: 96, conditions: [], joistFields: fields, ...answers,
})

export const J2X8 = joists('Main joists', { size: '2x8', species: 'Douglas fir-larch', grade: 'No.2', spacingIn: 16, spanFt: 12, joistCount: 13, topEdgeBraced: true })
export const J2X6_SHORT = joists('Main joists', { size: '2x6', species: 'Spruce-pine-fir', grade: 'No.2', spacingIn: 16, spanFt: 9.5, joistCount: 12, topEdgeBraced: true })
export const J2X6_NO_STAMP = joists('Main joists', { size: '2x6', species: 'unknown', grade: 'no stamp', spacingIn: 24, spanFt: 11, joistCount: 9, topEdgeBraced: null })
export const J2X10 = joists('North side', { size: '2x10', species: 'Southern pine', grade: 'No.2', spacingIn: 16, spanFt: 14, joistCount: 14, topEdgeBraced: true })
export const J2X6_HALL = joists('Over the hall', {
  size: '2x6', species: 'Spruce-pine-fir', grade: 'No.2', spacingIn: 16, spanFt: 8, joistCount: 8, topEdgeBraced: true,
  strongbacks: [{ atFt: 4, size: '2x6', breadthIn: null, depthIn: null, sound: true, engineerAccepts: false }],
  layout: { leftFt: 14, frontFt: 0, joistsRun: 'left-right' },
})
export const NOTCHED = joists('Main joists', {
  size: '2x8', species: 'Hem-fir', grade: 'No.2', spacingIn: 16, spanFt: 12, joistCount: 10, topEdgeBraced: true,
  notches: [{ depthIn: 1.5, lengthIn: 3, place: 'middle-third', edge: 'top' }],
})
export const TRUSSED: AtticSurvey = { ...emptySurvey(''), framing: 'trusses', access: 'hatch', openingWidthIn: 22, openingLengthIn: 30, clearHeightIn: 48, habitable: false, ceilingFinish: 'gypsum-half-inch', insulation: { material: 'cellulose', depthIn: 12 }, deck: 'none', conditions: [] }
