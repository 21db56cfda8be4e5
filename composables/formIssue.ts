/** What a zod issue carries, as far as words need it. */
export interface FormIssue {
  path: readonly PropertyKey[]
  message: string
  code?: string
  origin?: string
  minimum?: number | bigint
  maximum?: number | bigint
  inclusive?: boolean
  format?: string
  input?: unknown
}

/** zod's own English starts with one of these; a schema's own sentence does not, and is kept. */
const builtIn = /^(Invalid|Too (small|big)|Unrecognized|Expected)/

/** Plain words for what a schema refused. */
export function messageForIssue(issue: FormIssue): string {
  if (!builtIn.test(issue.message)) return issue.message
  switch (issue.code) {
    case 'too_small': return tooSmall(issue)
    case 'too_big': return tooBig(issue)
    case 'invalid_format': return formats[issue.format ?? ''] ?? 'This is not written the way we can read it.'
    case 'invalid_value': return 'Choose one of these.'
    case 'invalid_type': return invalidType(issue)
    default: return 'Please look at this again.'
  }
}

const formats: Record<string, string> = {
  email: 'Write an e-mail address, such as name@home.example.',
  date: 'Write a day of the calendar.',
  url: 'Write a whole web address, starting with https.',
}

function tooSmall({ origin, minimum, inclusive = true }: FormIssue): string {
  if (origin === 'string') return Number(minimum) <= 1 ? 'Please fill this in.' : `Use at least ${minimum} characters.`
  if (origin === 'array') return Number(minimum) <= 1 ? 'Choose at least one.' : `Give at least ${minimum}.`
  return inclusive ? `Use ${minimum} or more.` : `Use more than ${minimum}.`
}

function tooBig({ origin, maximum, inclusive = true }: FormIssue): string {
  if (origin === 'string') return `Use at most ${maximum} characters.`
  if (origin === 'array') return `Give at most ${maximum}.`
  return inclusive ? `Use ${maximum} or less.` : `Use less than ${maximum}.`
}

function invalidType(issue: FormIssue): string {
  if (/received NaN/.test(issue.message)) return 'Write this as a number, such as 12.5.'
  if (/received (undefined|null)/.test(issue.message)) return 'Please fill this in.'
  return /expected number/.test(issue.message) ? 'Write this as a number, such as 12.5.' : 'Please look at this again.'
}
