import { createTransport } from 'nodemailer'

export interface MailToSend { id: string, toAddress: string, subject: string, textBody: string, htmlBody: string }

/**
 * sent: the mail server took it. refused: it never will (a lasting answer, 5xx). delayed: not now (4xx).
 * away: nobody answered, so other mail will fare no better.
 */
export type SendOutcome = { kind: 'sent' } | { kind: 'refused' | 'delayed' | 'away', reason: string }

export interface Mailer { send: (mail: MailToSend) => Promise<SendOutcome>, close: () => void }

const TIMEOUTS_MS = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000, dnsTimeout: 10_000 }

/** One pooled connection set to SMTP_URL. The time-outs add up to less than the lease of a message. */
export function createMailer(smtpUrl: string, from: string, timeouts: Partial<typeof TIMEOUTS_MS> = {}): Mailer {
  const transport = createTransport({ url: smtpUrl, pool: true, maxConnections: 3, maxMessages: 100, ...TIMEOUTS_MS, ...timeouts })
  const domain = /@([^>\s]+)>?\s*$/.exec(from)?.[1] ?? 'lathkey.example'
  return {
    close: () => transport.close(),
    async send(mail) {
      try {
        await transport.sendMail({
          from, to: { name: '', address: mail.toAddress }, subject: mail.subject, text: mail.textBody, html: mail.htmlBody,
          // The same mail tried twice carries the same id, so that a mailbox can tell it is one.
          messageId: `<${mail.id}@${domain}>`,
          headers: { 'Auto-Submitted': 'auto-generated' },
          disableFileAccess: true, disableUrlAccess: true,
        })
        return { kind: 'sent' }
      }
      catch (error) {
        return outcomeOf(error)
      }
    },
  }
}

interface SmtpError { responseCode?: number, code?: string, command?: string, message?: string }

function outcomeOf(error: unknown): SendOutcome {
  const { responseCode, code, command, message = 'unknown reason' } = (error ?? {}) as SmtpError
  const reason = message.replace(/\s+/g, ' ').slice(0, 300)
  const aboutThisMail = command === 'RCPT TO' || command === 'DATA' || code === 'EENVELOPE' || code === 'EMESSAGE'
  if (responseCode !== undefined && responseCode >= 500 && aboutThisMail) return { kind: 'refused', reason }
  if (code === 'EENVELOPE' && responseCode === undefined) return { kind: 'refused', reason }
  return { kind: responseCode !== undefined && aboutThisMail ? 'delayed' : 'away', reason }
}
