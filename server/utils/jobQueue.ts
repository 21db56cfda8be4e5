import PgBoss from 'pg-boss'
import { logTrouble } from './logTrouble'

export interface ReviewOrder { organisationId: string, askedBy?: string, runId?: string }

/** What the queue does with its orders; throwing makes it try again later. */
export interface QueueWork {
  review: (order: ReviewOrder) => Promise<void>
  reviewFailed: (order: ReviewOrder) => Promise<void>
  mail: () => Promise<void>
  tidy: () => Promise<void>
}

export interface JobQueue {
  /** False while the queue is not up yet (the database is away). */
  order: (name: 'review' | 'mail' | 'tidy', data: object, singletonKey: string) => Promise<boolean>
  stop: () => Promise<void>
}

const TRY_AGAIN_MS = 5_000
const STOP_WITHIN_MS = 10_000
const REVIEW = { policy: 'short', retryLimit: 9, retryDelay: 2, retryBackoff: true, expireInMinutes: 60, deadLetter: 'review-failed' } as const
const MAIL = { policy: 'short', retryLimit: 0, expireInMinutes: 10 } as const
const TIDY = { policy: 'short', retryLimit: 3, retryDelay: 60, retryBackoff: true, expireInMinutes: 60 } as const
const POLL_S = 2

/**
 * pg-boss on the program's own database. If that is away at the start, the start is tried again until it works; if it goes
 * away later, the workers' own polling finds it again. Nothing here ends the process.
 */
export function startJobQueue(databaseUrl: string, work: QueueWork): JobQueue {
  let boss: PgBoss | undefined
  let isStopping = false
  let wake: (() => void) | undefined
  const pause = () => new Promise<void>((resolve) => {
    const timer = setTimeout(resolve, TRY_AGAIN_MS)
    timer.unref()
    wake = () => {
      clearTimeout(timer)
      resolve()
    }
  })
  const started = (async () => {
    while (!isStopping) {
      const next = makeBoss(databaseUrl)
      try {
        await next.start()
        await setUp(next, work)
        boss = next
        return
      }
      catch (error) {
        logTrouble('The job queue could not start; trying again', error)
        await next.stop({ graceful: false }).catch(() => undefined)
        await closePool(next)
        await pause()
      }
    }
  })()
  return {
    order: async (name, data, singletonKey) => {
      if (!boss || isStopping) return false
      await boss.send(name, data, { singletonKey })
      return true
    },
    stop: async () => {
      isStopping = true
      wake?.()
      await started
      await boss?.stop({ graceful: true, timeout: STOP_WITHIN_MS }).catch(error => logTrouble('The job queue did not stop well', error))
    },
  }
}

function makeBoss(databaseUrl: string): PgBoss {
  const boss = new PgBoss({ connectionString: databaseUrl, application_name: 'lathkey jobs', max: 3, schedule: false, deleteAfterDays: 7 })
  boss.on('error', error => logTrouble('The job queue met an error', error))
  return boss
}

/** A start that failed half-way counts as not started, so stop() leaves its pool open; it would keep the process alive. */
async function closePool(boss: PgBoss) {
  const db = boss.getDb() as { opened?: boolean, close?: () => Promise<void> }
  if (db.opened) await db.close?.().catch(() => undefined)
}

async function setUp(boss: PgBoss, work: QueueWork) {
  await boss.createQueue('review-failed', { name: 'review-failed', retryLimit: 3 })
  await boss.createQueue('review', { name: 'review', ...REVIEW })
  await boss.createQueue('mail', { name: 'mail', ...MAIL })
  await boss.createQueue('tidy', { name: 'tidy', ...TIDY })
  const polling = { pollingIntervalSeconds: POLL_S, batchSize: 1 }
  await boss.work<ReviewOrder>('review', polling, async ([job]) => { if (job) await work.review(job.data) })
  await boss.work<ReviewOrder>('review-failed', polling, async ([job]) => { if (job) await work.reviewFailed(job.data) })
  await boss.work('mail', polling, () => work.mail())
  await boss.work('tidy', polling, () => work.tidy())
}
