import { formatDay } from '../days'
import type { DueItem, DueKind } from '../upkeep/dueItems'
import type { ReadingDueReason } from '../upkeep/readingPlan'
import { countWords } from './activityMessages'

export const DUE_KIND_WORDS: Record<DueKind, string> = {
  'reading': 'Reading to take', 'inventory': 'List of stored things to confirm', 'inspection': 'Attic and ceilings to inspect',
  'job': 'Job to finish', 'look-again': 'Finding to look at again', 'invitation': 'Invitation about to lapse',
}

export const READING_REASON_WORDS: Record<ReadingDueReason, string> = {
  'new-mark': 'a week after it was first reported or read', 'second-reading': 'two weeks after the second reading', 'monthly': 'once a month',
  'active-weekly': 'every week while it is active', 'trial-fortnightly': 'every two weeks during the unload trial', 'dormant-quarterly': 'every three months while it is quiet',
}

/** 'Due 14 Mar 2027, 3 days late'. */
export function dueSentence(item: Pick<DueItem, 'dueOn' | 'daysLate' | 'kind'>): string {
  const lead = item.kind === 'invitation' ? 'Lapses' : 'Due'
  return item.daysLate > 0 ? `${lead} ${formatDay(item.dueOn)}, ${countWords(item.daysLate, 'day')} late` : `${lead} ${formatDay(item.dueOn)}`
}
