import type { ChainState, RecordRow } from '../../types/record'
import { formatNumber, type UnitSystem } from '../units'
import { fieldWords, valueWords } from './recordWords'

type Entry = Pick<RecordRow, 'action' | 'actorName' | 'before' | 'after'>

export interface RecordChangeLine { key: string, field: string, before: string | null, after: string | null }

/** The name people know the thing by, where the entry carries one. */
function nameOf(entry: Entry): string | undefined {
  for (const key of ['name', 'title', 'label', 'tenantName', 'fileName', 'email']) {
    const found = entry.after?.[key] ?? entry.before?.[key]
    if (typeof found === 'string' && found !== '') return found
  }
  return undefined
}

/** 'Room added: Kitchen, by Oona Invented.' */
export function recordSentence(entry: Entry): string {
  const action = entry.action.charAt(0).toUpperCase() + entry.action.slice(1)
  const name = nameOf(entry)
  return `${action}${name ? `: ${name}` : ''}, by ${entry.actorName}.`
}

/**
 * What an entry changed, field by field. A side is null where the entry has none:
 * something new has no before, something ended no after. Ids of other rows tell a person nothing and are left out.
 */
export function recordChanges(entry: Entry, system: UnitSystem = 'us'): RecordChangeLine[] {
  const keys = [...new Set([...Object.keys(entry.before ?? {}), ...Object.keys(entry.after ?? {})])]
  return keys.filter(key => !/Ids?$|Key$/.test(key) && key !== 'id').map(key => ({
    key, field: fieldWords(key),
    before: side(entry.before, key, system),
    after: side(entry.after, key, system),
  }))
}

const side = (values: Entry['before'], key: string, system: UnitSystem) =>
  values && key in values ? valueWords(key, values[key], system) : null

/** The state of a chain in words: what was found, and what that means. */
export function chainSentence(chain: ChainState): { word: 'Unbroken' | 'Broken', sentence: string } {
  if (chain.kind === 'unbroken') {
    return { word: 'Unbroken', sentence: chain.entries === 0
      ? 'There is no entry yet.'
      : `All ${formatNumber(chain.entries)} ${chain.entries === 1 ? 'entry follows' : 'entries follow'} from one another. Nothing was changed or taken out afterwards.` }
  }
  return { word: 'Broken', sentence: `The chain breaks at entry ${formatNumber(chain.seq)}: ${chain.why}. Entries before it still hold. Keep a copy of the database and ask who had access to it.` }
}
