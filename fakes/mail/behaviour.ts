/**
 * How the fake treats mail.
 * accept: takes it. refuse: not now (421, or 451 for the recipients named). bounce: never (550). hang: takes the connection
 * and says nothing. drop: takes the whole message, then cuts the line without an answer. slow: waits before each answer.
 */
export const mailModes = ['accept', 'refuse', 'bounce', 'hang', 'drop', 'slow'] as const
export type MailMode = typeof mailModes[number]

export interface MailBehaviour {
  mode: MailMode
  slowMs: number
  /** Only these addresses meet the mode; none named: all do. */
  recipients: string[]
}

export const acceptEverything: MailBehaviour = { mode: 'accept', slowMs: 3_000, recipients: [] }

export function isMailMode(value: unknown): value is MailMode {
  return mailModes.some(mode => mode === value)
}

export function meetsMode(behaviour: MailBehaviour, mode: MailMode, address: string) {
  return behaviour.mode === mode && (behaviour.recipients.length === 0 || behaviour.recipients.includes(address.toLowerCase()))
}

/** Reads what the control route was sent; undefined when it makes no sense. */
export function readBehaviour(body: unknown): MailBehaviour | undefined {
  if (typeof body !== 'object' || body === null) return undefined
  const { mode, slowMs = acceptEverything.slowMs, recipients = [] } = body as Record<string, unknown>
  if (!isMailMode(mode) || typeof slowMs !== 'number' || !(slowMs >= 0) || !Array.isArray(recipients)) return undefined
  return { mode, slowMs, recipients: recipients.map(address => String(address).toLowerCase()) }
}
