import type { JobState } from '../../types/job'

/** Where a job may go from each state. Confirmed is the end: a mistake there needs a new job, so that the record stays plain. */
export const JOB_MOVES: Record<JobState, readonly JobState[]> = {
  planned: ['scheduled', 'done', 'cancelled'],
  scheduled: ['planned', 'done', 'cancelled'],
  done: ['confirmed', 'scheduled'],
  confirmed: [],
  cancelled: ['planned'],
}

/** What somebody who does the job, but does not manage it, may say about it. */
const DOER_MOVES: readonly JobState[] = ['scheduled', 'done']

/** `manages`: plans, confirms and cancels; otherwise only what the doer of the job may say. A done job is no longer the doer's to move. */
export function jobMovesFor(state: JobState, manages: boolean): JobState[] {
  if (manages) return [...JOB_MOVES[state]]
  return state === 'planned' || state === 'scheduled' ? JOB_MOVES[state].filter(to => DOER_MOVES.includes(to)) : []
}
