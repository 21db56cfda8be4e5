import { setTimeout as wait } from 'node:timers/promises'
import { acceptEverything, type MailBehaviour, type MailMode } from './behaviour'
import { listenForReaders } from './inbox'
import { openMessageStore, type FakeMessage } from './messageStore'
import { listenForMail } from './smtp'

export interface FakeMail {
  smtpUrl: string
  inboxUrl: string
  messages: () => FakeMessage[]
  messagesTo: (address: string) => FakeMessage[]
  /** The newest message to the address, waiting for one to come. */
  waitForMessage: (address: string, wanted?: { subject?: RegExp, timeoutMs?: number }) => Promise<FakeMessage>
  setMode: (mode: MailMode, details?: Partial<Omit<MailBehaviour, 'mode'>>) => void
  clear: () => void
  close: () => Promise<void>
}

export interface FakeMailOptions { smtpPort?: number, webPort?: number, folder?: string }

/** A mail server that delivers to nobody, and a page to read what it got. Port 0: any free one. */
export async function startFakeMail({ smtpPort = 0, webPort = 0, folder }: FakeMailOptions = {}): Promise<FakeMail> {
  const store = await openMessageStore(folder)
  let behaviour = acceptEverything
  const behave = (next: MailBehaviour) => void (behaviour = next)
  const smtp = await listenForMail(smtpPort, store, () => behaviour)
  const inbox = await listenForReaders(webPort, { store, behaviour: () => behaviour, behave })
  const messagesTo = (address: string) => store.messages().filter(({ recipients }) => recipients.some(recipient => recipient.toLowerCase() === address.toLowerCase()))
  return {
    smtpUrl: smtp.url,
    inboxUrl: inbox.url,
    messages: store.messages,
    messagesTo,
    async waitForMessage(address, { subject = /^/, timeoutMs = 10_000 } = {}) {
      const deadline = Date.now() + timeoutMs
      for (;;) {
        const found = messagesTo(address).findLast(message => subject.test(message.subject))
        if (found) return found
        if (Date.now() > deadline) {
          throw new Error(`No mail to ${address} with a subject like ${subject} within ${timeoutMs} ms. Present: ${store.messages().map(message => `${message.recipients.join(', ')}: ${message.subject}`).join(' | ') || 'none'}`)
        }
        await wait(50)
      }
    },
    setMode: (mode, details = {}) => behave({ ...acceptEverything, ...details, recipients: (details.recipients ?? []).map(address => address.toLowerCase()), mode }),
    clear: store.clear,
    close: async () => {
      await Promise.all([smtp.close(), inbox.close()])
    },
  }
}
