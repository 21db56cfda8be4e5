import type { Trx } from '../connect'
import { nowInstant } from '../../utils/clock'
import { kickMail } from '../../utils/kickMail'
import { renderMail, type MailContent } from '../../utils/mailDesign'
import { newId } from '../../utils/newId'

export interface OutgoingMessage {
  organisationId: string | null
  userId: string | null
  /** What it is about, kebab-case: 'invitation', 'new-finding', 'digest'. */
  kind: string
  mailClass: 'safety' | 'duty' | 'habit' | 'account'
  toAddress: string
  content: MailContent
  /** The same cause and person give the same key; a second message with it is not written. */
  dedupeKey: string
}

/** Writes one mail in the transaction of its cause and asks for it to be sent after the commit. Undefined: it was queued before. */
export async function queueMessage(trx: Trx, { content, ...message }: OutgoingMessage): Promise<string | undefined> {
  const { subject, text, html } = renderMail(content)
  const at = nowInstant()
  const row = await trx.insertInto('message')
    .values({ id: newId(), ...message, subject, textBody: text, htmlBody: html, createdAt: at, nextAttemptAt: at })
    .onConflict(conflict => conflict.column('dedupeKey').doNothing())
    .returning('id').executeTakeFirst()
  if (row) kickMail()
  return row?.id
}
