type Sender = () => void

/** The cause of a mail may still be uncommitted at the first look; the second one and the minute's job catch it. */
const LOOKS_AFTER_MS = [150, 1_500]

let sender: Sender | undefined
const waiting = new Set<NodeJS.Timeout>()

/** The server names its sender once at start; scripts have none, and their mail goes out when a server runs. */
export function setMailSender(next: Sender | undefined) {
  sender = next
  if (next) return
  for (const timer of waiting) clearTimeout(timer)
  waiting.clear()
}

/** Asks for waiting mail to go out now rather than at the next minute. Never throws, never waits. */
export function kickMail(afterMs: readonly number[] = LOOKS_AFTER_MS) {
  if (!sender || waiting.size >= 8) return
  for (const delay of afterMs) {
    const timer = setTimeout(() => {
      waiting.delete(timer)
      sender?.()
    }, delay)
    timer.unref()
    waiting.add(timer)
  }
}
