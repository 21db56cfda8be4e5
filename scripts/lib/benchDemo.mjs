import { Refusal } from './refusal.mjs'

/** @param {string} address @param {{ email: string, password: string }} person @returns {Promise<string>} the session's cookie */
export async function openSession(address, { email, password }) {
  const answer = await fetch(`${address}/api/auth/sign-in`, {
    method: 'POST', headers: { 'content-type': 'application/json', 'origin': address }, body: JSON.stringify({ email, password }),
  })
  if (!answer.ok) throw new Refusal(`Signing in as ${email} answered ${answer.status}: ${await answer.text()}`)
  return answer.headers.getSetCookie().map(line => line.split(';')[0]).join('; ')
}

/** Of a list's rows the one whose own answer is the longest: the hardest case of the demo. */
async function findLongest({ address, cookie, list, one }) {
  const read = path => fetch(`${address}${path}`, { headers: { cookie } })
  const answer = await read(list)
  if (!answer.ok) throw new Refusal(`${list} answered ${answer.status}: ${await answer.text()}`)
  let longest = { id: undefined, length: -1 }
  for (const { id } of (await answer.json()).rows) {
    const { length } = await (await read(one(id))).text()
    if (length > longest.length) longest = { id, length }
  }
  if (!longest.id) throw new Refusal(`${list} has no rows; the demo is empty.`)
  return longest.id
}

/**
 * What is measured: the program's answers to an owner, on the fullest unit, attic and mark of the demo.
 * @param {{ address: string, cookie: string }} options
 * Each twice: as people ask it, and made anew each time, as after a change (no-cache, RFC 9111 §5.2.1.4).
 * @returns {Promise<{ name: string, path: string, kind: 'json' | 'page' | 'anew', against: 'json' | 'page', headers: Record<string, string> }[]>}
 */
export async function chooseRoutes({ address, cookie }) {
  const longest = (list, one) => findLongest({ address, cookie, list, one })
  const unitId = await longest('/api/units', id => `/api/units/${id}`)
  const atticId = await longest('/api/attics', id => `/api/attics/${id}`)
  const markId = await longest('/api/marks', id => `/api/marks/${id}`)
  const json = [
    ['/api/me'], ['/api/overview'], ['/api/properties'], ['/api/marks'],
    ['/api/units/:id', `/api/units/${unitId}`], ['/api/attics/:id', `/api/attics/${atticId}`], ['/api/marks/:id', `/api/marks/${markId}`],
  ]
  const pages = [['/sign-in'], ['/overview'], ['/units/:id', `/units/${unitId}`], ['/attics/:id', `/attics/${atticId}`]]
  const asked = [
    ...json.map(([name, path = name]) => ({ name, path, against: 'json' })),
    ...pages.map(([name, path = name]) => ({ name, path, against: 'page' })),
  ]
  return asked.flatMap(route => [
    { ...route, kind: route.against, headers: {} },
    { ...route, kind: 'anew', name: `${route.name}, made anew`, headers: { 'cache-control': 'no-cache' } },
  ])
}
