import { createHash, randomBytes } from 'node:crypto'

/** 256 bits that only the mail carries; the database keeps their digest, so that reading it opens nothing. */
export function newLinkToken(): { token: string, tokenHash: string } {
  const token = randomBytes(32).toString('base64url')
  return { token, tokenHash: hashLinkToken(token) }
}

export const hashLinkToken = (token: string) => createHash('sha256').update(token).digest('hex')

export const isLinkToken = (text: unknown): text is string => typeof text === 'string' && /^[\w-]{43}$/.test(text)
