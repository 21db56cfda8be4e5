import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeAttic } from '../../../server/db/commands/judgeAttic'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { SYSTEM_ACTOR, verifyChain } from '../../../server/db/commands/appendRecord'
import { nowInstant } from '../../../server/utils/clock'
import type { NoticesOfUnit, NoticeView } from '../../../shared/types/notice'
import { EMERGENCY_CALL, LEAVE_ROOM, LEAVE_ROOM_SIGNS, WATER_CAUTION } from '../../../shared/utils/messages/safety'
import { readPdf } from '../../support/pdf'
import { bringEngineer, expectGuarded, expectUnsound } from '../homes/guarded'
import { addItem, addMark, addReport, addSurvey, soundSurvey } from '../review/inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'

let open: OpenServer
let home: OpenHome

beforeAll(async () => { open = await openServer() })
afterAll(() => open.close())

const judge = () => open.db.transaction().execute(trx => judgeAttic(trx, SYSTEM_ACTOR, home.atticId))
const raisePath = () => `/api/rooms/${home.roomId}/notices`
const raise = (more: object = {}) => home.as.manager.post<NoticeView & Refusal>(raisePath(), { atticId: home.atticId, ...more })
const listed = async (who: 'owner' | 'tenant') => (await home.as[who].get<NoticesOfUnit>(`/api/units/${home.unitId}/notices`)).body

/** A home whose attic holds far too much. */
async function overload() {
  home = await open.openHome()
  await open.db.updateTable('organisation').set({ contactPhone: '+1 555 0134' }).where('id', '=', home.organisationId).execute()
  await addSurvey(open.db, home)
  const itemId = await addItem(open.db, home, 20_000)
  await judge()
  return itemId
}

describe('a keep-clear notice', () => {
  it('is raised with one tap while the attic is over, is seen by the tenant, stands when the load is gone, and ends with a reason', async () => {
    const itemId = await overload()
    expect((await listed('owner')).causes).toEqual([{ cause: 'attic-over', atticId: home.atticId, findingId: null, roomId: null, label: 'Loft' }])
    const { status, body } = await raise()
    expect(status).toBe(200)
    expect(body).toMatchObject({ roomName: 'Bedroom', cause: 'attic-over', area: 'The whole room', raisedByName: 'Milo', liftedAt: null, isCauseOpen: true, contact: { phone: '+1 555 0134' } })
    expect(await listed('tenant')).toMatchObject({ open: [{ id: body.id, waitingFor: expect.stringContaining('unloaded') }], lifted: [], causes: [], rooms: [], contactPhone: '+1 555 0134' })

    await open.db.updateTable('atticItem').set({ removedOn: nowInstant().slice(0, 10) }).where('id', '=', itemId).execute()
    await judge()
    expect((await home.as.owner.get<NoticeView>(`/api/notices/${body.id}`)).body).toMatchObject({ liftedAt: null, isCauseOpen: false })

    const lift = () => home.as.owner.post<NoticeView & Refusal>(`/api/notices/${body.id}/lifting`, { reason: ' Boxes are out, looked at from below. ' })
    expect((await lift()).body).toMatchObject({ liftedByName: 'Oona', liftedReason: 'Boxes are out, looked at from below.' })
    const again = await lift()
    expect([again.status, again.body.data.code]).toEqual([409, 'already-lifted'])
    expect(await listed('tenant')).toMatchObject({ open: [], lifted: [{ id: body.id }] })
    const entries = await open.db.selectFrom('recordEntry').select(['action', 'after']).where('subjectId', '=', body.id).orderBy('seq').execute()
    expect(entries).toMatchObject([
      { action: 'keep-clear notice raised', after: { name: 'Bedroom', cause: 'attic-over', area: 'The whole room' } },
      { action: 'keep-clear notice lifted', after: { name: 'Bedroom', reason: 'Boxes are out, looked at from below.' } },
    ])
    expect(await verifyChain(open.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('is one a room, however often it is tapped; after lifting another may follow and both are kept', async () => {
    await overload()
    const answers = await Promise.all([raise(), raise(), raise()])
    expect(answers.map(answer => answer.status).sort()).toEqual([200, 409, 409])
    const first = answers.find(answer => answer.status === 200)!.body
    expect(answers.find(answer => answer.status === 409)!.body.data).toMatchObject({ code: 'notice-stands', noticeId: first.id })
    await home.as.owner.post(`/api/notices/${first.id}/lifting`, { reason: 'Looked at.' })
    expect((await raise({ area: 'Under the hatch', waitingFor: 'The boxes to be carried down' })).body).toMatchObject({ area: 'Under the hatch', waitingFor: 'The boxes to be carried down' })
    expect(await open.db.selectFrom('keepClearNotice').select('area').where('roomId', '=', home.roomId).orderBy('raisedAt').execute()).toHaveLength(2)
  })

  it('is raised from a danger sign for the room of that mark only, and from an attic on hold', async () => {
    home = await open.openHome()
    const mark = await addMark(open.db, home, { kind: 'sag' })
    await addReport(open.db, home, mark, ['bulge-or-growing-sag'])
    await open.db.transaction().execute(trx => judgeMark(trx, SYSTEM_ACTOR, mark))
    const { causes } = await listed('owner')
    const danger = causes.find(cause => cause.cause === 'danger-sign')!
    expect(danger).toMatchObject({ atticId: null, roomId: home.roomId })
    expect((await home.as.owner.post<NoticeView>(raisePath(), { findingId: danger.findingId })).body).toMatchObject({ cause: 'danger-sign', findingId: danger.findingId, isCauseOpen: true })
    await addSurvey(open.db, home, soundSurvey({ conditions: ['cut'] }))
    await judge()
    expect((await listed('owner')).causes.map(cause => cause.cause)).toContain('attic-on-hold')
  })

  it('is refused without a cause, with both causes or none, for what is not there, and for a reason that says nothing', async () => {
    home = await open.openHome()
    await addSurvey(open.db, home)
    await judge()
    const none = await raise()
    expect([none.status, none.body.data.code]).toEqual([409, 'no-cause'])
    await expectUnsound(home.as.owner, { method: 'post', path: raisePath(), body: {} }, 'cause')
    await expectUnsound(home.as.owner, { method: 'post', path: raisePath(), body: { atticId: home.atticId, findingId: home.atticId } }, 'cause')
    await expectUnsound(home.as.owner, { method: 'post', path: raisePath(), body: { atticId: home.atticId, area: ' ' } }, 'area')
    await overload()
    const { body } = await raise()
    await expectUnsound(home.as.owner, { method: 'post', path: `/api/notices/${body.id}/lifting`, body: { reason: '  ' } }, 'reason')
  })

  it('answers only those it concerns', async () => {
    await overload()
    await expectGuarded(home, { method: 'post', path: raisePath(), body: { atticId: home.atticId } })
    const { body } = await raise()
    await expectGuarded(home, { method: 'get', path: `/api/units/${home.unitId}/notices` }, 'allowed')
    await expectGuarded(home, { method: 'get', path: `/api/notices/${body.id}` }, 'allowed')
    await expectGuarded(home, { method: 'get', path: `/papers/notices/${body.id}/keep-clear.pdf` }, 'allowed')
    await expectGuarded(home, { method: 'post', path: `/api/notices/${body.id}/lifting`, body: { reason: 'I say so' } })
    const engineer = await bringEngineer(open.db, open.server.url, home)
    expect((await engineer.get(`/api/notices/${body.id}`)).status).toBe(200)
    expect((await engineer.post(`/api/notices/${body.id}/lifting`, { reason: 'Looks fine' })).status).toBe(403)
  })
})

describe('the printed notice', () => {
  it.each(['letter', 'a4'])('on %s is one page: area, since when, whom to call, what it waits for, and every warning sign; once lifted it says so', async (paper) => {
    await overload()
    const { body } = await raise()
    const print = async () => readPdf(new Uint8Array(await (await home.as.tenant.send(`/papers/notices/${body.id}/keep-clear.pdf?paper=${paper}`)).arrayBuffer()))
    const { pages, text } = await print()
    expect(pages).toBe(1)
    for (const words of ['Keep clear', 'Bedroom', '4 Alder Row, Upstairs', 'The whole room', 'More is stored in the attic above', 'until it is within its rating', 'Plumbline Homes, +1 555 0134', LEAVE_ROOM, LEAVE_ROOM_SIGNS, WATER_CAUTION, EMERGENCY_CALL]) {
      expect(text.replaceAll(/\s+/g, ' ')).toContain(words)
    }
    await home.as.owner.post(`/api/notices/${body.id}/lifting`, { reason: 'Unloaded and looked at.' })
    expect((await print()).text.replaceAll(/\s+/g, ' ')).toMatch(/Lifted .* by Oona: Unloaded and looked at\./)
  })
})
