import type { HindsightOutcome, LedgerList } from '~/shared/types/hindsight'

export const OUTCOME_WORDS: Record<HindsightOutcome, string> = { right: 'Right', wrong: 'A false alarm' }

export const LEDGER_LIST_WORDS: Record<LedgerList, string> = { 'all': 'All', 'not-judged': 'Not judged yet', 'right': 'Right', 'wrong': 'False alarms' }
