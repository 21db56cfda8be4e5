import { messageForIssue } from './formIssue'

/** A refused request, read from what $fetch throws: h3's shape `{ statusCode, message, data: { code, fields, … } }`. */
export interface FormProblem {
  status: number
  code: string
  message: string
  fields: Record<string, string>
  /** On 409: the version the server holds now. */
  theirs?: unknown
  /** On 429 and 503: when it is worth trying again. */
  retryAfterS?: number
}

type Loose = Record<string, unknown>

const kindWords: Record<number, string> = {
  0: 'We could not reach Lathkey. What you wrote is still here: try again when you have a signal.',
  401: 'You are signed out. Sign in again in another tab, then send this once more.',
  403: 'Your account may not do this. Ask the owner of the account.',
  404: 'This is no longer here, or it is not yours to see.',
  409: 'Somebody else changed this while you were writing.',
  413: 'This is too large to send.',
  422: 'Some of this needs another look.',
  429: 'That was many tries in a short time. Wait a little, then try again.',
  503: 'Lathkey is not available just now. What you wrote is still here: try again in a minute.',
}

const unexpected = 'Something went wrong on our side. What you wrote is still here: try again in a minute.'

function isLoose(value: unknown): value is Loose {
  return value !== null && typeof value === 'object'
}

function textFields(value: unknown): Record<string, string> {
  if (!isLoose(value)) return {}
  return Object.fromEntries(Object.entries(value)
    .filter((entry): entry is [string, string] => typeof entry[1] === 'string')
    .map(([field, message]) => [field, messageForIssue({ path: [field], message })]))
}

function retryAfter(error: Loose, detail: Loose): number | undefined {
  if (typeof detail.retryAfterSeconds === 'number') return detail.retryAfterSeconds
  const response = error.response
  const header = isLoose(response) && response.headers instanceof Headers ? response.headers.get('retry-after') : null
  return header && /^\d+$/.test(header) ? Number(header) : undefined
}

export function readProblem(error: unknown): FormProblem {
  const thrown = isLoose(error) ? error : {}
  const answer = isLoose(thrown.data) ? thrown.data : {}
  const detail = isLoose(answer.data) ? answer.data : {}
  const status = Number(thrown.statusCode ?? thrown.status ?? answer.statusCode ?? 0) || 0
  const said = typeof answer.message === 'string' && typeof detail.code === 'string' ? answer.message : undefined
  return {
    status,
    code: typeof detail.code === 'string' ? detail.code : status === 0 ? 'no-connection' : 'unexpected',
    message: said ?? kindWords[status] ?? unexpected,
    fields: textFields(detail.fields),
    theirs: detail.theirs,
    retryAfterS: retryAfter(thrown, detail),
  }
}
