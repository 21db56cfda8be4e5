import type { UnloadTrialState } from '~/shared/types/unloadTrial'

export const TRIAL_STATE_WORDS: Record<UnloadTrialState, string> = { 'planned': 'Planned', 'unloaded': 'Unloaded, being watched', 'ended': 'Ended', 'given-up': 'Given up' }
