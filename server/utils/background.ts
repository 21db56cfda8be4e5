import cron from 'node-cron'
import { failReview } from '../db/commands/failReview'
import { forgetLoosePhotos } from '../db/commands/forgetLoosePhotos'
import { reviewOrganisation } from '../db/commands/reviewOrganisation'
import { findOrganisationsToReview } from '../db/queries/reviews'
import { startJobQueue, type JobQueue, type ReviewOrder } from './jobQueue'
import { kickMail, setMailSender } from './kickMail'
import { logTrouble } from './logTrouble'
import { createMailer } from './mailer'
import { createMailSender } from './mailSender'
import { usePhotoStore } from './photoStore'
import { useDb } from './useDb'

export interface Background { queue: JobQueue, stop: () => Promise<void> }

let running: Background | undefined

/** False while the queue is not up; the caller then says that it will be tried again. */
export async function orderReview(order: ReviewOrder): Promise<boolean> {
  return await running?.queue.order('review', order, order.runId ?? order.organisationId) ?? false
}

/** The clock only orders; the queue does the work, once for any number of servers. */
export function startBackground(settings: { databaseUrl: string, smtpUrl: string | undefined, mailFrom: string }): Background {
  const sender = settings.smtpUrl ? createMailSender(useDb, createMailer(settings.smtpUrl, settings.mailFrom)) : undefined
  if (sender) setMailSender(() => void sender.send())
  const queue = startJobQueue(settings.databaseUrl, {
    review,
    reviewFailed: order => failReview(useDb(), order),
    mail: async () => sender?.send(),
    tidy: async () => void await forgetLoosePhotos(useDb(), usePhotoStore()),
  })
  const clock = [
    cron.schedule('*/15 * * * *', () => orderDueReviews(queue), { name: 'review-due', noOverlap: true }),
    cron.schedule('* * * * *', () => orderAlone(queue, 'mail'), { name: 'mail-due', noOverlap: true }),
    cron.schedule('40 3 * * *', () => orderAlone(queue, 'tidy'), { name: 'tidy-due', noOverlap: true }),
  ]
  const soon = setTimeout(() => void orderDueReviews(queue), 10_000)
  soon.unref()
  return running = { queue, stop: async () => {
    running = undefined
    clearTimeout(soon)
    setMailSender(undefined)
    await Promise.all(clock.map(task => task.destroy()))
    await queue.stop()
    await sender?.stop()
  } }
}

/** Another run under way is tried again later; a run that is done needs nothing. */
async function review({ organisationId, askedBy, runId }: ReviewOrder) {
  const answer = await reviewOrganisation(useDb(), organisationId, { askedBy, runId })
  if (answer.kind === 'under way' && askedBy) throw new Error('Another review of this organisation is under way')
  kickMail()
}

async function orderDueReviews(queue: JobQueue) {
  try {
    for (const { organisationId, today } of await findOrganisationsToReview(useDb())) await queue.order('review', { organisationId }, `${organisationId}:${today}`)
  }
  catch (error) {
    logTrouble('Due reviews could not be ordered', error)
  }
}

async function orderAlone(queue: JobQueue, name: 'mail' | 'tidy') {
  try { await queue.order(name, {}, name) }
  catch (error) { logTrouble(`The work '${name}' could not be ordered`, error) }
}
