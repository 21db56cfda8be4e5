import type { JobPriority, JobState } from '../../types/job'

export const JOB_STATE_WORDS: Record<JobState, string> = {
  planned: 'Planned', scheduled: 'Has a day', done: 'Done, to be confirmed', confirmed: 'Confirmed', cancelled: 'Cancelled',
}

/** What pressing the button does. */
export const JOB_MOVE_WORDS: Record<JobState, string> = {
  planned: 'Back to planned', scheduled: 'Set the day', done: 'It is done', confirmed: 'Confirm that it is done', cancelled: 'Cancel the job',
}

export const JOB_PRIORITY_WORDS: Record<JobPriority, string> = { danger: 'Danger', urgent: 'Urgent', routine: 'Routine' }
