import { daysBetween } from '../../../shared/utils/days'
import type { Db, Trx } from '../connect'
import { digestLinesFor, type DigestLines, type DigestPool } from '../../utils/digestLines'
import { digestMail } from '../../utils/digestMail'
import { findDigestReaders, findDueLines, findReachableUnits, findWaitingFindings, type DigestReader } from '../queries/digest'
import type { Checkpoint } from './makeCheckpoint'
import { queueMessage } from './queueMessage'

const READERS_AT_ONCE = 100

interface Organisation { id: string, name: string }
interface DigestRun { organisation: Organisation, pool: DigestPool, checkpoint: Checkpoint }

/** Queues at most one digest a person, organisation and day; nothing to say, no mail. Returns how many were queued now. */
export async function queueDigests(db: Db, organisation: Organisation, today: string, checkpoint: Checkpoint): Promise<number> {
  const pool: DigestPool = {
    today, findings: await findWaitingFindings(db, organisation.id), due: await findDueLines(db, organisation.id), reachableUnits: await findReachableUnits(db, organisation.id, today),
  }
  let queued = 0
  let after: string | undefined
  for (;;) {
    const readers = await findDigestReaders(db, organisation.id, today, after, READERS_AT_ONCE)
    if (readers.length === 0) return queued
    queued += await db.transaction().execute(trx => queueFor(trx, readers, { organisation, pool, checkpoint }))
    after = readers.at(-1)!.userId
  }
}

async function queueFor(trx: Trx, readers: DigestReader[], run: DigestRun): Promise<number> {
  let queued = 0
  for (const reader of readers) {
    const lines = digestLinesFor(reader, run.pool)
    if (lines && await queueDigest(trx, reader, lines, run)) queued += 1
  }
  return queued
}

async function queueDigest(trx: Trx, reader: DigestReader, lines: DigestLines, { organisation, pool, checkpoint }: DigestRun): Promise<boolean> {
  const { today } = pool
  const id = await queueMessage(trx, {
    organisationId: organisation.id, userId: reader.userId, kind: 'digest', mailClass: 'habit', toAddress: reader.email,
    content: digestMail({ reader, lines, today, organisationName: organisation.name, checkpoint }),
    dedupeKey: `digest:${organisation.id}:${reader.userId}:${today}`,
  })
  if (id === undefined) return false
  if (reader.role === 'tenant') await noteReminders(trx, lines, today)
  return true
}

/** Two people of one home asked on one day are one reminder. */
async function noteReminders(trx: Trx, lines: DigestLines, today: string) {
  const fresh = lines.due.filter(line => line.lastRemindedOn === null || daysBetween(line.lastRemindedOn, today) > 0).map(line => line.id)
  if (fresh.length === 0) return
  await trx.updateTable('dueItem').set(eb => ({ remindersSent: eb('remindersSent', '+', 1), lastRemindedOn: today }))
    .where('id', 'in', fresh).where(eb => eb.or([eb('lastRemindedOn', 'is', null), eb('lastRemindedOn', '<', today)])).execute()
}
