import type { ChainState, RecordRow } from '../../types/record'
import { FINDING_TITLES, isFindingRule } from '../messages/findingMessages'
import { formatNumber, type UnitSystem } from '../units'
import { fieldWords, isEmptyValue, quantityWords, valueWords } from './recordWords'

type Entry = Pick<RecordRow, 'action' | 'actorName' | 'before' | 'after'> & { subjectId?: string }

export interface RecordChangeLine { key: string, field: string, before: string | null, after: string | null }

/** The name people know the thing by: as the entry says, or as it is called today. */
function nameOf(entry: Entry, names: ReadonlyMap<string, string>): string | undefined {
  for (const key of ['name', 'title', 'label', 'tenantName', 'fileName', 'email']) {
    const found = entry.after?.[key] ?? entry.before?.[key]
    if (typeof found === 'string' && found !== '') return found
  }
  const rule = entry.after?.rule ?? entry.before?.rule
  if (typeof rule === 'string' && isFindingRule(rule)) return FINDING_TITLES[rule]
  return readingName(entry) ?? names.get(entry.subjectId ?? '')
}

/** A reading is told by its mark and its value. */
function readingName({ after }: Entry): string | undefined {
  if (typeof after?.markNumber !== 'number') return undefined
  const read = typeof after.value === 'number' ? quantityWords(after.value, after.quantity) : 'could not be measured'
  return `mark ${after.markNumber}, ${read}`
}

/** 'Room added: Kitchen, by Oona Invented.' `names` tells what a thing is called today, by its id. */
export function recordSentence(entry: Entry, names: ReadonlyMap<string, string> = new Map()): string {
  const action = entry.action.charAt(0).toUpperCase() + entry.action.slice(1)
  const name = nameOf(entry, names)
  return `${action}${name ? `: ${name}` : ''}, by ${entry.actorName}.`
}

/**
 * What an entry changed, field by field. A side is null where the entry has none: something new has no before,
 * something ended no after. Left out: ids of other rows, which tell a person nothing, and what a new thing left empty.
 */
export function recordChanges(entry: Entry, system: UnitSystem = 'us'): RecordChangeLine[] {
  const keys = [...new Set([...Object.keys(entry.before ?? {}), ...Object.keys(entry.after ?? {})])]
  return keys
    .filter(key => !/(^id|Ids?|Key)$/.test(key) && !(isEmptyValue(entry.before?.[key]) && isEmptyValue(entry.after?.[key])))
    .map(key => ({ key, field: fieldWords(key), before: side(entry.before, key, system), after: side(entry.after, key, system) }))
}

function side(values: Entry['before'], key: string, system: UnitSystem): string | null {
  if (!values || !(key in values)) return null
  const value = values[key]
  const isMeasured = typeof value === 'number' && ['value', 'sigma', 'low', 'high'].includes(key)
  return isMeasured ? quantityWords(value, values.quantity) : valueWords(key, value, system)
}

/** The state of a chain in words: what was found, and what that means. */
export function chainSentence(chain: ChainState): { word: 'Unbroken' | 'Broken', sentence: string } {
  if (chain.kind === 'unbroken') {
    return { word: 'Unbroken', sentence: chain.entries === 0
      ? 'There is no entry yet.'
      : chain.entries === 1 ? 'The one entry is as it was written.' : `All ${formatNumber(chain.entries)} entries follow from one another. None was changed or taken out afterwards.` }
  }
  return { word: 'Broken', sentence: `The chain breaks at entry ${formatNumber(chain.seq)}: ${chain.why}. Entries before it still hold. Keep a copy of the database and ask who had access to it.` }
}
