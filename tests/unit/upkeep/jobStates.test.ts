import { describe, expect, it } from 'vitest'
import { JOB_STATES } from '../../../shared/types/job'
import { JOB_MOVES, jobMovesFor } from '../../../shared/utils/upkeep/jobStates'

describe('the way of a job', () => {
  it('leads from planned to confirmed, and ends there', () => {
    expect(JOB_MOVES.planned).toContain('scheduled')
    expect(JOB_MOVES.scheduled).toContain('done')
    expect(JOB_MOVES.done).toContain('confirmed')
    expect(JOB_MOVES.confirmed).toEqual([])
  })

  it('reaches confirmed from everywhere but never without being done first', () => {
    for (const state of JOB_STATES) if (state !== 'done') expect(JOB_MOVES[state]).not.toContain('confirmed')
  })

  it('lets nobody stay where they are', () => {
    for (const state of JOB_STATES) expect(JOB_MOVES[state]).not.toContain(state)
  })

  it('gives the doer no more than the manager, and neither confirming nor cancelling', () => {
    for (const state of JOB_STATES) {
      const doer = jobMovesFor(state, false)
      expect(jobMovesFor(state, true)).toEqual(expect.arrayContaining(doer))
      expect(doer).not.toContain('confirmed')
      expect(doer).not.toContain('cancelled')
    }
    expect(jobMovesFor('done', false)).toEqual([])
  })
})
