import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { measuresOf, percentile, pressInTurn } from '../../../scripts/lib/benchLoad.mjs'
import { processorMs } from '../../../scripts/lib/benchProcess.mjs'
import { isReviewQuickEnough, reviewTableOf } from '../../../scripts/lib/benchReview.mjs'
import { domainTableOf, meetsTarget, tableOf } from '../../../scripts/lib/benchTable.mjs'
import { chooseRoutes, openSession } from '../../../scripts/lib/benchDemo.mjs'

let server: Server
let url: string
let asked: string[]
beforeEach(async () => {
  asked = []
  server = createServer((request, response) => {
    asked.push(request.url ?? '')
    const answer = answers[request.url ?? '']
    response.writeHead(answer ? 200 : 404, { 'set-cookie': 'session=sealed; Path=/; HttpOnly' })
    response.end(JSON.stringify(answer ?? { message: 'none' }))
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})
afterEach(() => server.close())

const rows = (...ids: string[]) => ({ rows: ids.map(id => ({ id })) })
const answers: Record<string, object> = {
  '/fine': {}, '/api/auth/sign-in': {},
  '/api/units': rows('u1', 'u2'), '/api/units/u1': { rooms: ['one'] }, '/api/units/u2': { rooms: ['one', 'two'] },
  '/api/attics': rows('a1'), '/api/attics/a1': {},
  '/api/marks': rows('m1', 'm2'), '/api/marks/m1': { readings: [1, 2, 3] }, '/api/marks/m2': {},
}

test('percentiles are by nearest rank, whatever the order', () => {
  const times = [5, 1, 4, 2, 3]
  expect(percentile(times, 0.5)).toBe(3)
  expect(percentile(times, 0.95)).toBe(5)
  expect(percentile([7], 0.5)).toBe(7)
})

test('times of all rounds together give the measures', () => {
  expect(measuresOf({ times: [1, 2, 3, 4], refused: 1, seconds: 2, processorMs: 20 })).toEqual({ perSecond: 2, p50Ms: 2, p95Ms: 4, refused: 1, processorMs: 4 })
  expect(measuresOf({ times: [], refused: 3, seconds: 2, processorMs: 0 })).toMatchObject({ perSecond: 0, p50Ms: undefined, p95Ms: undefined, refused: 3 })
})

test('targets are asked in turn, and only answers of 200 are timed', async () => {
  const targets = [{ url: `${url}/fine` }, { url: `${url}/none` }]
  const [fine, none] = [...(await pressInTurn(targets, { connections: 2, seconds: 2, rounds: 2 })).values()]
  expect(fine?.times.length).toBeGreaterThan(0)
  expect(fine?.refused).toBe(0)
  expect(none?.times).toEqual([])
  expect(none?.refused).toBeGreaterThan(0)
  expect(asked.indexOf('/fine')).toBeLessThan(asked.indexOf('/none'))
  expect(asked.indexOf('/none')).toBeLessThan(asked.lastIndexOf('/fine'))
}, 30_000)

test('the fullest unit, attic and mark of the demo are the ones measured', async () => {
  const routes = await chooseRoutes({ address: url, cookie: 'session=sealed' })
  const pathOf = (name: string) => routes.find(route => route.name === name)?.path
  expect(pathOf('/api/units/:id')).toBe('/api/units/u2')
  expect(pathOf('/api/marks/:id')).toBe('/api/marks/m1')
  expect(pathOf('/units/:id')).toBe('/units/u2')
  expect(routes.filter(route => route.kind === 'page').map(route => route.name)).toEqual(['/sign-in', '/overview', '/units/:id', '/attics/:id'])
  expect(routes.find(route => route.name === '/units/:id, made anew')).toEqual({
    name: '/units/:id, made anew', kind: 'anew', against: 'page', path: '/units/u2', headers: { 'cache-control': 'no-cache' },
  })
})

test('a session is the cookie alone, without its attributes', async () => {
  expect(await openSession(url, { email: 'oona@plumbline.example', password: 'nine quiet rafters' })).toBe('session=sealed')
})

const measures = (change = {}) => ({ perSecond: 4_000, p50Ms: 4, p95Ms: 9, processorMs: 0.25, refused: 0, ...change })

test.each([
  ['a quick JSON route', { kind: 'json', ratio: 0.4, measures: measures() }, true],
  ['a JSON route slower than its share of the bare route', { kind: 'json', ratio: 0.399, measures: measures() }, false],
  ['a JSON route with a slow twentieth', { kind: 'json', ratio: 0.9, measures: measures({ p95Ms: 50 }) }, false],
  ['a route that refused once', { kind: 'json', ratio: 0.9, measures: measures({ refused: 1 }) }, false],
  ['a page at half the minimal page', { kind: 'page', ratio: 0.5, measures: measures({ p95Ms: 90 }) }, true],
  ['a page below half', { kind: 'page', ratio: 0.49, measures: measures() }, false],
  ['a route that answered nothing', { kind: 'page', ratio: 0, measures: measuresOf({ times: [], refused: 9, seconds: 1, processorMs: 0 }) }, false],
] as const)('%s', (_name, row, isMet) => {
  expect(meetsTarget({ name: 'route', ...row })).toBe(isMet)
})

test('an answer made anew is measured, without a target', () => {
  const row = { name: '/overview, made anew', kind: 'anew', ratio: 0.1, measures: measures() } as const
  expect(meetsTarget(row)).toBeUndefined()
  expect(tableOf([row]).split('\n')[2]).toBe('| /overview, made anew | 4000 | 4.00 | 9.00 | 0.25 | 0.10 |  |  |')
})

test('the table gives each route its numbers, its target and whether it is met', () => {
  const table = tableOf([
    { name: 'bare route', kind: 'reference', ratio: 1, measures: measures({ perSecond: 8_000 }) },
    { name: '/api/me', kind: 'json', ratio: 0.5, measures: measures() },
    { name: '/overview', kind: 'page', ratio: 0.3, measures: measures({ perSecond: 93.4, p95Ms: 123.45, refused: 2 }) },
  ]).split('\n')
  expect(table[2]).toBe('| bare route | 8000 | 4.00 | 9.00 | 0.25 | 1.00 | reference |  |')
  expect(table[3]).toBe('| /api/me | 4000 | 4.00 | 9.00 | 0.25 | 0.50 | p95 < 50 ms, ≥ 0.40 × bare route | met |')
  expect(table[4]).toBe('| /overview | 93 | 4.00 | 123.5 | 0.25 | 0.30 | ≥ 0.50 × minimal page | **missed** (2 refused) |')
})

test('processor time of a process only grows, and one that is not there has none', () => {
  const before = processorMs(process.pid)
  expect(before).toBeGreaterThan(0)
  expect(processorMs(process.pid)).toBeGreaterThanOrEqual(before ?? Infinity)
  expect(processorMs(undefined)).toBeUndefined()
})

test('calculations alone have a table of their own', () => {
  expect(domainTableOf([{ name: 'trend', p50Ms: 1.23456, p95Ms: 2 }])).toContain('| trend | 1.235 | 2.000 |')
  const [, , met, missed] = domainTableOf([
    { name: 'plan', p50Ms: 2, p95Ms: 3, mostP50Ms: 4, plainP50Ms: 8 }, { name: 'map', p50Ms: 50, p95Ms: 60, mostP50Ms: 40, plainP50Ms: 500 },
  ]).split('\n')
  expect(met).toBe('| plan | 2.000 | 3.000 | 8.000 | 4.0 | p50 < 4 ms | met |')
  expect(missed).toMatch(/ 10\.0 \| p50 < 40 ms \| \*\*missed\*\* \|$/)
})

test('the review shows marks a second beside the rate in memory, and misses when it takes too long', () => {
  const night = { name: 'first night', marks: 1000, attics: 200, seconds: 2, mostSeconds: 60, marksPerSecond: 500, processorSeconds: 1.5, firstThirdMb: 150.2, lastThirdMb: 151.9 }
  const table = reviewTableOf({ nights: [night, { ...night, seconds: 61 }], pureMarksPerSecond: 5000 })
  expect(table).toContain('| first night | 1000 | 200 | 2.0 | 1.5 | 500 | 5000 | 0.10 | 150 / 152 | < 60 s | met |')
  expect(table).toContain('| 61.0 | 1.5 | 500 | 5000 | 0.10 | 150 / 152 | < 60 s | **missed** |')
  expect([isReviewQuickEnough(night), isReviewQuickEnough({ ...night, seconds: 60 })]).toEqual([true, false])
})
