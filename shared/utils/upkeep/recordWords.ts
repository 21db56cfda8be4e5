import { formatDay, isDay } from '../days'
import { countWords } from '../messages/activityMessages'
import { FINDING_TITLES, isFindingRule } from '../messages/findingMessages'
import { formatInches, formatLength, formatLoad, formatNumber, formatShare, formatWeight, formatWidth, NO_BREAK_SPACE, type UnitSystem } from '../units'

/** What each kind of entry is about, for the filter of the record. */
export const RECORD_SUBJECT_WORDS: Record<string, string> = {
  property: 'Property', unit: 'Unit', room: 'Rooms', tenancy: 'Tenancies', attic: 'Attics', survey: 'Attic surveys', document: 'Documents',
  item: 'Stored items', mark: 'Marks', observation: 'Reports', reading: 'Readings', photo: 'Photos', finding: 'Findings', notice: 'Keep-clear notices', trial: 'Unload trials', job: 'Jobs',
  person: 'People', invitation: 'Invitations', organisation: 'Organisation', review: 'Daily reviews', message: 'Mail',
}

/** Names of fields where the words in the code are not the words on the screen. */
const FIELD_WORDS: Record<string, string> = {
  isBedroom: 'used as a bedroom', addressLines: 'address', archivedAt: 'archived', startsOn: 'first day', endsOn: 'last day', tenantName: 'tenant',
  accessNotes: 'how to get in', ceilingHeightIn: 'height to the ceiling', ratedPsf: 'rating', onHold: 'on hold', lowLb: 'least it may weigh',
  typicalLb: 'usual weight', highLb: 'most it may weigh', xFt: 'from the wall', yFt: 'across the joists', psf: 'load', costCents: 'cost',
  pinX: 'place along the room', pinY: 'place across the room', lookAgainOn: 'look again on', assigneeUserId: 'given to', dangerSigns: 'danger signs',
  sigma: 'uncertainty of the reading', sha256: 'fingerprint of the file', byteLength: 'size in bytes',
}

/** 'startsOn' → 'first day', 'lengthFt' → 'length': the unit goes with the number. */
export function fieldWords(key: string): string {
  if (FIELD_WORDS[key]) return FIELD_WORDS[key]
  const words = key.replace(/(Ft|In|Lb|Psf|Mm|Cents|On|At)$/, '').replace(/([A-Z])/g, ' $1').replace(/[-_]/g, ' ').toLowerCase().trim()
  return words || key
}

const UNIT_FORMATS: [RegExp, (value: number, system: UnitSystem) => string][] = [
  [/Ft$/, formatLength], [/In$/, formatInches], [/Lb$/, formatWeight], [/[pP]sf$/, formatLoad], [/Mm$/, formatWidth],
  [/Cents$/, cents => formatNumber(cents / 100, 2)], [/(Share|utilisation)$/, share => formatShare(share)], [/^pin[XY]$/, share => formatShare(share)],
]

/** One value of the record as a person reads it; the field's name tells the unit. */
export function valueWords(key: string, value: unknown, system: UnitSystem = 'us'): string {
  if (value === null || value === undefined || value === '') return 'nothing'
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value === 'number') return numberWords(key, value, system)
  if (typeof value === 'string') return textWords(key, value)
  if (Array.isArray(value)) return listWords(key, value, system)
  const told = Object.entries(value).filter(([name, part]) => !isEmptyValue(part) && !/(^id|Ids?|Key)$/.test(name))
  return told.length === 0 ? 'nothing' : told.map(([name, part]) => `${fieldWords(name)} ${valueWords(name, part, system)}`).join('; ')
}

export const isEmptyValue = (value: unknown): boolean =>
  value === null || value === undefined || value === '' || (Array.isArray(value) && value.length === 0)

function listWords(key: string, list: unknown[], system: UnitSystem): string {
  if (list.length === 0) return 'nothing'
  // Photos are told by number: each has its own page with the fingerprint.
  if (key === 'photos') return String(list.length)
  return list.map(part => valueWords(key, part, system)).join(typeof list[0] === 'object' ? ' · ' : ', ')
}

/** A reading's value with the unit its quantity is in. */
export function quantityWords(value: number, quantity: unknown): string {
  return quantity === 'pop_count' ? countWords(value, 'pop') : `${formatNumber(value, 2)}${NO_BREAK_SPACE}mm`
}

function numberWords(key: string, value: number, system: UnitSystem): string {
  const format = UNIT_FORMATS.find(([pattern]) => pattern.test(key))?.[1]
  if (format) return format(value, system)
  return key === 'yearBuilt' ? String(value) : formatNumber(value, 4)
}

const INSTANT = /^\d{4}-\d{2}-\d{2}T[\d:.]+Z$/
const CODE = /^[a-z0-9]+(-[a-z0-9]+)+$/

function textWords(key: string, value: string): string {
  if (isDay(value)) return formatDay(value)
  if (key === 'rule' && isFindingRule(value)) return FINDING_TITLES[value]
  if (INSTANT.test(value)) return `${formatDay(value.slice(0, 10))}, ${value.slice(11, 16)} UTC`
  // Choices are kept as codes ('plaster-on-lath'); what a person typed is shown as typed.
  return CODE.test(value) && !FREE_TEXT.test(key) ? value.replaceAll('-', ' ') : value
}

const FREE_TEXT = /(name|notes|label|title|note|lines|description|sha256|file)/i
