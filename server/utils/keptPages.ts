import { randomBytes } from 'node:crypto'
import type { H3Event } from 'h3'
import { contentPolicy } from './contentPolicy'
import { isAskedAnew, keptStore, placeFor, placeForAnybody, readKept, type KeptPlace } from './keptAnswers'
import { useDb } from './useDb'

const ofPeople = keptStore(48)
/** Apart, so that strangers asking for many addresses push out no page of a person who is signed in. */
const ofAnybody = keptStore(4)

const NONCE_HERE = '\u0000nonce\u0000'

const storeOf = (event: H3Event) => isSignedIn(event) ? ofPeople : ofAnybody
const isSignedIn = (event: H3Event) => getCookie(event, useRuntimeConfig().session.name ?? 'nuxt-session') !== undefined

/** Where the page at this address is kept for the asker; a database that is away is left for the page itself to tell. */
async function placeOfPage(event: H3Event): Promise<KeptPlace | undefined> {
  if (!isSignedIn(event)) return isAskedAnew(event) ? undefined : placeForAnybody(event)
  try { return await placeFor(event, useDb()) }
  catch { return undefined }
}

/** The whole page when it was made before and nothing the asker could see has changed; otherwise notes where to keep it. */
export async function keptPage(event: H3Event): Promise<string | undefined> {
  const place = await placeOfPage(event)
  const text = place && readKept(storeOf(event), place)
  if (text === undefined) {
    event.context.keepPageAs = place
    return undefined
  }
  const nonce = randomBytes(16).toString('base64')
  setResponseHeaders(event, { 'content-type': 'text/html;charset=utf-8', 'content-security-policy': contentPolicy(nonce) })
  return text.replaceAll(NONCE_HERE, nonce)
}

/** Keeps a page that came out whole. A page that sets a cookie, answers with a refusal or met one on the way is not kept. */
export function keepPage(event: H3Event, response: { body?: unknown, statusCode?: number }) {
  const { keepPageAs: place, mayKeepPage, nonce } = event.context
  const isWhole = (response.statusCode ?? 200) === 200 && typeof response.body === 'string' && !getResponseHeader(event, 'set-cookie')
  if (!place || !mayKeepPage || !nonce || !isWhole) return
  storeOf(event).set(place.key, { state: place.state, text: (response.body as string).replaceAll(nonce, NONCE_HERE) })
}
