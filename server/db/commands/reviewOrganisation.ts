import { sql } from 'kysely'
import type { Db } from '../connect'
import { dayIn, nowInstant } from '../../utils/clock'
import { newId } from '../../utils/newId'
import { findUnitsAfter } from '../queries/reviewing'
import { escalateUnanswered } from './escalateUnanswered'
import { makeCheckpoint } from './makeCheckpoint'
import { queueDigests } from './queueDigests'
import { reviewUnits } from './reviewUnits'

export interface ReviewCounts { units: number, unitsDone: number, attics: number, marks: number, due: number, unanswered: number, digests: number }

export type ReviewAnswer
  = | { kind: 'reviewed', runId: string, counts: ReviewCounts }
    /** Today's run is done, or somebody else is at it. */
    | { kind: 'already reviewed' | 'under way' }

export interface ReviewOptions {
  /** A person who asked for it by hand; without one it is the day's own run, of which there is one. */
  askedBy?: string
  /** The run that was written down when it was asked for. */
  runId?: string
}

const UNITS_AT_ONCE = 20
const DEADLOCK = '40P01'

type Organisation = NonNullable<Awaited<ReturnType<typeof findOrganisation>>>
const findOrganisation = (db: Db, id: string) => db.selectFrom('organisation').selectAll().where('id', '=', id).executeTakeFirst()

/**
 * The daily review of one organisation: every unit judged anew and what is due kept, owners told of what nobody answers,
 * the record's checkpoint made, one digest a person queued. A lock of the database session lets one run at a time, and goes
 * with a crash; what is left of a cut-off run is done by the next call of the day.
 */
export async function reviewOrganisation(db: Db, organisationId: string, options: ReviewOptions = {}): Promise<ReviewAnswer> {
  return db.connection().execute(async (session) => {
    const { rows: [lock] } = await sql<{ taken: boolean }>`select pg_try_advisory_lock(hashtextextended(${`review ${organisationId}`}, 0)) as taken`.execute(session)
    if (!lock?.taken) return { kind: 'under way' }
    try {
      const organisation = await findOrganisation(db, organisationId)
      if (!organisation) throw new Error('No such organisation to review')
      const today = dayIn(organisation.timeZone)
      const runId = await openRun(db, organisationId, today, options)
      return runId ? await runReview(db, organisation, today, runId) : { kind: 'already reviewed' }
    }
    finally {
      await sql`select pg_advisory_unlock(hashtextextended(${`review ${organisationId}`}, 0))`.execute(session)
    }
  })
}

/** The run to work on: a new one, the one asked for, or today's own if it was cut off. */
async function openRun(db: Db, organisationId: string, today: string, { askedBy, runId }: ReviewOptions): Promise<string | undefined> {
  const id = runId ?? newId()
  await db.insertInto('reviewRun').values({ id, organisationId, reviewedOn: today, askedBy: askedBy ?? null, startedAt: nowInstant(), counts: '{}' })
    .onConflict(conflict => conflict.doNothing()).execute()
  const open = await db.selectFrom('reviewRun').select('id').where('organisationId', '=', organisationId).where('finishedAt', 'is', null)
    .$if(askedBy === undefined, query => query.where('askedBy', 'is', null).where('reviewedOn', '=', today))
    .$if(askedBy !== undefined, query => query.where('askedBy', 'is not', null))
    .executeTakeFirst()
  return open?.id
}

async function runReview(db: Db, organisation: Organisation, today: string, runId: string): Promise<ReviewAnswer> {
  const counts: ReviewCounts = { units: 0, unitsDone: 0, attics: 0, marks: 0, due: 0, unanswered: 0, digests: 0 }
  const note = (more: { finishedAt?: string, error?: string | null } = {}) =>
    db.updateTable('reviewRun').set({ counts: JSON.stringify(counts), ...more }).where('id', '=', runId).execute()
  try {
    counts.units = await countUnits(db, organisation.id)
    await note({ error: null })
    await reviewInBatches(db, organisation.id, counts, note)
    counts.unanswered = await escalateUnanswered(db, organisation)
    const checkpoint = await db.transaction().execute(trx => makeCheckpoint(trx, organisation.id, today))
    counts.digests = await queueDigests(db, organisation, today, checkpoint)
    await note({ finishedAt: nowInstant() })
    return { kind: 'reviewed', runId, counts }
  }
  catch (error) {
    // Left unfinished, so that the next try takes it up again; the reason shows on the settings page.
    await note({ error: (error instanceof Error ? error.message : String(error)).slice(0, 500) }).catch(() => undefined)
    throw error
  }
}

async function countUnits(db: Db, organisationId: string): Promise<number> {
  const row = await db.selectFrom('unit').select(eb => eb.fn.countAll<number>().as('n')).where('organisationId', '=', organisationId).executeTakeFirstOrThrow()
  return row.n
}

async function reviewInBatches(db: Db, organisationId: string, counts: ReviewCounts, note: () => Promise<unknown>) {
  let after: string | undefined
  for (;;) {
    const units = await findUnitsAfter(db, organisationId, after, UNITS_AT_ONCE)
    if (units.length === 0) return
    const { attics, marks, due } = await reviewUnitsAgain(db, organisationId, units.map(unit => unit.id))
    counts.unitsDone += units.length
    counts.attics += attics
    counts.marks += marks
    counts.due += due
    await note()
    after = units.at(-1)!.id
  }
}

/** Somebody may be writing in the same unit crosswise; the database then ends one of the two, and the review is the one that can wait. */
async function reviewUnitsAgain(db: Db, organisationId: string, unitIds: string[], tries = 3) {
  for (;;) {
    try { return await reviewUnits(db, organisationId, unitIds) }
    catch (error) {
      tries -= 1
      if ((error as { code?: string }).code !== DEADLOCK || tries === 0) throw error
    }
  }
}
