import type { Db } from '../db/connect'
import { nextAttemptAt, sendWaitingMessages } from '../db/commands/sendWaitingMessages'
import { now } from './clock'
import { kickMail } from './kickMail'
import { logTrouble } from './logTrouble'
import type { Mailer } from './mailer'

/** Beyond this the minute's job comes first anyway. */
const SOON_MS = 60_000

export interface MailSender { send: () => Promise<void>, stop: () => Promise<void> }

/** Sends what waits, one pass at a time in this process; asked meanwhile, it looks once more at the end. */
export function createMailSender(db: () => Db, mailer: Mailer): MailSender {
  let running: Promise<void> | undefined
  let isAskedAgain = false
  let isStopping = false

  async function pass() {
    do {
      isAskedAgain = false
      await sendWaitingMessages(db(), mailer)
    } while (isAskedAgain && !isStopping)
    const at = await nextAttemptAt(db())
    const waitMs = at === undefined ? undefined : new Date(at).getTime() - now().getTime()
    if (waitMs !== undefined && waitMs > 0 && waitMs < SOON_MS) kickMail([waitMs + 100])
  }

  return {
    async send() {
      if (isStopping) return
      isAskedAgain = true
      running ??= pass().catch(error => logTrouble('Waiting mail could not be sent just now', error)).finally(() => { running = undefined })
      await running
    },
    async stop() {
      isStopping = true
      await running
      mailer.close()
    },
  }
}
