import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { newId } from '../../../server/utils/newId'
import { NOTHING_ASKED } from '../../../shared/types/mark'
import type { MarkPage } from '../../../shared/types/markPage'
import type { Receipt } from '../../../shared/types/receipt'
import { DANGER_SIGN_WORDS } from '../../../shared/utils/messages/markMessages'
import { EMERGENCY_CALL, LEAVE_ROOM, WATER_CAUTION } from '../../../shared/utils/messages/safety'
import { readPdf } from '../../support/pdf'
import { expectGuarded, expectUnsound } from '../homes/guarded'
import { addMark, today } from '../review/inventHome'
import { openServer, type OpenHome, type OpenServer, type Refusal } from '../review/openHome'

let open: OpenServer
let home: OpenHome
let path: string
let formPath: string

beforeAll(async () => {
  open = await openServer()
  home = await open.openHome()
  path = `/api/units/${home.unitId}/paper-reports`
  formPath = `/papers/units/${home.unitId}/report-form.pdf`
})
afterAll(() => open.close())

const sheet = (report: object = {}, paper: object = {}) => ({
  paper: { reporterName: ' Greta Invented ', filledInOn: today(-9), ...paper },
  report: { ...NOTHING_ASKED, kind: 'crack', roomId: home.roomId, widthComparison: 'card', ...report },
})
const enter = (body: object, key = newId()) => home.as.manager.post<Receipt & Refusal>(path, body, { headers: { 'idempotency-key': key } })

describe('a report filled in on paper', () => {
  it('keeps who filled it in and when, apart from who entered it and when it was received; its reading is of that day', async () => {
    const key = newId()
    const { status, body } = await enter(sheet(), key)
    expect(status).toBe(200)
    expect(body).toMatchObject({ reportedBy: 'Milo', paper: { reporterName: 'Greta Invented', filledInOn: today(-9) }, mark: { firstSeenOn: today(-9) } })
    expect(body.receivedAt.slice(0, 10)).toBe(today())
    expect((await enter(sheet(), key)).body.id).toBe(body.id)
    const row = await open.db.selectFrom('observation').selectAll().where('id', '=', body.id).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ paperReporter: 'Greta Invented', paperFilledInOn: today(-9), reportedBy: home.manager })
    expect(await open.db.selectFrom('reading').select(['takenOn', 'method']).where('markId', '=', body.mark.id).execute()).toEqual([{ takenOn: today(-9), method: 'coin-or-card' }])
    expect(await open.db.selectFrom('recordEntry').select(['action', 'after']).where('subjectId', '=', body.id).executeTakeFirstOrThrow())
      .toMatchObject({ action: 'paper report entered', after: { filledInBy: 'Greta Invented', filledInOn: today(-9) } })
    const page = (await home.as.owner.get<MarkPage>(`/api/marks/${body.mark.id}`)).body
    expect(page.reports).toMatchObject([{ paperReporter: 'Greta Invented', paperFilledInOn: today(-9) }])
  })

  it('with a danger sign is a finding at once, however old the sheet is', async () => {
    const { body } = await enter(sheet({ kind: 'sag', widthComparison: null, dangerSigns: ['bits-falling'] }, { filledInOn: today(-30) }))
    expect(body).toMatchObject({ responseClass: 'danger', dangerSigns: ['bits-falling'] })
    const finding = await open.db.selectFrom('finding').select(['rule', 'severity']).where('subjectId', '=', body.mark.id).where('rule', '=', 'danger-sign').executeTakeFirst()
    expect(finding).toMatchObject({ severity: 'urgent' })
  })

  it('joins a mark that is followed; an old dry sheet does not undo that it drips now, nor open a repair that came after it', async () => {
    const mark = await addMark(open.db, home, { kind: 'stain', createdDaysAgo: 60 })
    await open.db.updateTable('mark').set({ stainState: 'dripping', lastReadOn: today(-1), state: 'repaired', segment: 2 }).where('id', '=', mark).execute()
    await open.db.insertInto('markRepair').values({ id: newId(), organisationId: home.organisationId, markId: mark, repairedOn: today(-3), reason: 'Sealed', recordedBy: home.manager, recordedAt: new Date().toISOString() }).execute()
    const { status, body } = await enter(sheet({ kind: 'stain', widthComparison: null, stain: 'dry', stainSizeMm: 100, sameAsMarkId: mark }))
    expect([status, body.joinedKnownMark, body.mark?.id]).toEqual([200, expect.any(Boolean), mark])
    expect(await open.db.selectFrom('mark').select(['stainState', 'state']).where('id', '=', mark).executeTakeFirstOrThrow()).toEqual({ stainState: 'dripping', state: 'repaired' })
    expect(await open.db.selectFrom('reading').select('segment').where('markId', '=', mark).execute()).toEqual([{ segment: 1 }])
  })

  it('is refused with words at the field', async () => {
    const unsound = async (body: object, field: string) => {
      const { status, body: refusal } = await enter(body)
      expect([status, Object.keys(refusal.data.fields ?? {})]).toEqual([422, [field]])
    }
    await unsound(sheet({}, { filledInOn: today(1) }), 'filledInOn')
    await unsound(sheet({}, { reporterName: ' ' }), 'paper.reporterName')
    await unsound(sheet({ firstSeenOn: today(-2) }), 'firstSeenOn')
    await unsound(sheet({ roomId: newId() }), 'roomId')
    await expectUnsound(home.as.owner, { method: 'post', path, body: { paper: {}, report: {} } }, 'paper.reporterName')
    expect((await home.as.owner.post<Refusal>(path, sheet())).body.data.code).toBe('idempotency-key-needed')
  })

  it('is entered by staff only; the form is printed by whoever may report', async () => {
    await expectGuarded(home, { method: 'post', path, body: sheet() })
    await expectGuarded(home, { method: 'get', path: formPath }, 'allowed')
    expect((await home.as.tenant.send(formPath)).status).toBe(200)
    expect((await home.as.trades.send(formPath)).status).toBe(404)
  })

  it.each(['letter', 'a4'])('prints on %s in three pages, danger signs and what to do about them on the first', async (size) => {
    const { pages, text } = await readPdf(new Uint8Array(await (await home.as.owner.send(`${formPath}?paper=${size}`)).arrayBuffer()))
    expect(pages).toBe(3)
    const flat = text.replaceAll(/\s+/g, ' ')
    const first = flat.slice(0, flat.indexOf('page 1 of 3'))
    for (const words of ['Something on a ceiling', '4 Alder Row, Upstairs', LEAVE_ROOM, WATER_CAUTION, EMERGENCY_CALL, DANGER_SIGN_WORDS['bits-falling'], 'Bedroom', 'A web of many']) expect(first).toContain(words)
    expect(first.indexOf('Is any of this happening?')).toBeLessThan(first.indexOf('Which room is it in?'))
    expect(flat).toContain('Filled in on')
  })
})
