import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeAttic } from '../../../server/db/commands/judgeAttic'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { verifyChain, type RecordActor } from '../../../server/db/commands/appendRecord'
import { addItem, addMark, addReading, addReport, addSurvey, emailOf, inventHome, openDatabase, soundSurvey, today, type InventedHome } from './inventHome'

let opened: Awaited<ReturnType<typeof openDatabase>>
const actor: RecordActor = { userId: null, name: 'Test' }

beforeAll(async () => { opened = await openDatabase() })
afterAll(() => opened.drop())

const judgeTheAttic = (home: InventedHome) => opened.db.transaction().execute(trx => judgeAttic(trx, actor, home.atticId))
const judgeTheMark = (id: string) => opened.db.transaction().execute(trx => judgeMark(trx, actor, id))
const openRules = async (subjectId: string) => (await opened.db.selectFrom('finding').select(['rule', 'severity']).where('subjectId', '=', subjectId).where('clearedAt', 'is', null).orderBy('rule').execute())
const eventKinds = async (subjectId: string) => (await opened.db.selectFrom('findingEvent as e').innerJoin('finding as f', 'f.id', 'e.findingId').select(['e.kind', 'f.rule']).where('f.subjectId', '=', subjectId).orderBy('e.happenedAt').orderBy('e.id').execute()).map(row => `${row.rule} ${row.kind}`)
const statusOf = (unitId: string) => opened.db.selectFrom('unitStatus').selectAll().where('unitId', '=', unitId).executeTakeFirstOrThrow()
const mailOf = (organisationId: string) => opened.db.selectFrom('message').selectAll().where('organisationId', '=', organisationId).orderBy('createdAt').execute()

describe('judging an attic', () => {
  it('opens, escalates and clears a finding as the load rises and goes, each with an event and a record entry', async () => {
    const home = await inventHome(opened.db)
    await addSurvey(opened.db, home)
    const first = await addItem(opened.db, home, 4000)
    await judgeTheAttic(home)
    expect(await openRules(home.atticId)).toContainEqual({ rule: 'attic-load', severity: 'attention' })
    expect(await statusOf(home.unitId)).toMatchObject({ loadState: 'near', storedLb: 4000, worstSeverity: 'attention', atticCount: 1 })

    await addItem(opened.db, home, 1500)
    await judgeTheAttic(home)
    expect(await openRules(home.atticId)).toContainEqual({ rule: 'attic-load', severity: 'urgent' })
    expect(await statusOf(home.unitId)).toMatchObject({ loadState: 'over', worstSeverity: 'urgent' })

    await opened.db.updateTable('atticItem').set({ removedOn: today() }).where('id', '!=', first).where('atticId', '=', home.atticId).execute()
    await opened.db.updateTable('atticItem').set({ lowLb: 100, typicalLb: 100, highLb: 100 }).where('id', '=', first).execute()
    await judgeTheAttic(home)
    expect(await openRules(home.atticId)).toEqual([])
    expect(await statusOf(home.unitId)).toMatchObject({ loadState: 'within', storedLb: 100, openFindings: 0, topFindingId: null })
    expect((await eventKinds(home.atticId)).filter(text => text.startsWith('attic-load'))).toEqual(['attic-load opened', 'attic-load escalated', 'attic-load cleared'])
    const entries = await opened.db.selectFrom('recordEntry').select('action').where('unitId', '=', home.unitId).where('subjectKind', '=', 'finding').execute()
    expect(entries.map(entry => entry.action)).toEqual(expect.arrayContaining(['finding opened', 'finding escalated', 'finding cleared']))
    expect(await verifyChain(opened.db, home.unitId)).toMatchObject({ kind: 'unbroken' })
  })

  it('changes nothing when judged twice, and keeps the numbers fresh while the severity stays', async () => {
    const home = await inventHome(opened.db)
    await addSurvey(opened.db, home)
    await addItem(opened.db, home, 4000)
    await judgeTheAttic(home)
    const before = await eventKinds(home.atticId)
    await judgeTheAttic(home)
    expect(await eventKinds(home.atticId)).toEqual(before)
    await addItem(opened.db, home, 50)
    await judgeTheAttic(home)
    const finding = await opened.db.selectFrom('finding').select('evidence').where('subjectId', '=', home.atticId).where('rule', '=', 'attic-load').executeTakeFirstOrThrow()
    expect(finding.evidence).toMatchObject({ totalLb: 4050 })
    expect(await eventKinds(home.atticId)).toEqual(before)
  })

  it('ends an acknowledgement when the finding grows graver', async () => {
    const home = await inventHome(opened.db)
    await addSurvey(opened.db, home)
    await addItem(opened.db, home, 4000)
    await judgeTheAttic(home)
    await opened.db.updateTable('finding').set({ acknowledgedAt: new Date().toISOString(), acknowledgedBy: home.owner, acknowledgedReason: 'Will look in spring', lookAgainOn: today(30) })
      .where('subjectId', '=', home.atticId).execute()
    await addItem(opened.db, home, 1500)
    await judgeTheAttic(home)
    const finding = await opened.db.selectFrom('finding').selectAll().where('subjectId', '=', home.atticId).where('rule', '=', 'attic-load').executeTakeFirstOrThrow()
    expect(finding).toMatchObject({ severity: 'urgent', acknowledgedAt: null, acknowledgedReason: null, lookAgainOn: null })
  })

  it('mails owner and manager once about an attic over its rating, and the tenant not at all', async () => {
    const home = await inventHome(opened.db)
    await addSurvey(opened.db, home)
    await addItem(opened.db, home, 5500)
    await judgeTheAttic(home)
    await judgeTheAttic(home)
    const mail = await mailOf(home.organisationId)
    expect(mail.map(message => message.userId).sort()).toEqual([home.owner, home.manager].sort())
    expect(mail[0]).toMatchObject({ kind: 'urgent-finding', mailClass: 'duty' })
    expect(mail[0]!.textBody).toContain('Stop adding.')
    expect(mail[0]!.textBody.replace(/\s+/g, ' ')).toContain('It is not an engineering assessment.')
  })

  it('says hold before anything else, and that things without a survey need one', async () => {
    const held = await inventHome(opened.db)
    await addSurvey(opened.db, held, soundSurvey({ conditions: ['wet'] }))
    await addItem(opened.db, held, 40)
    await judgeTheAttic(held)
    expect((await openRules(held.atticId)).map(finding => finding.rule)).toEqual(['contents-under-hold'])
    expect(await statusOf(held.unitId)).toMatchObject({ loadState: 'hold' })

    const unknown = await inventHome(opened.db)
    await addItem(opened.db, unknown, 40)
    await judgeTheAttic(unknown)
    expect((await openRules(unknown.atticId)).map(finding => finding.rule)).toEqual(['contents-without-survey'])
    expect(await statusOf(unknown.unitId)).toMatchObject({ loadState: 'unsurveyed' })
  })

  it('never rates trusses, so anything stored on them is over', async () => {
    const home = await inventHome(opened.db)
    await addSurvey(opened.db, home, soundSurvey({ framing: 'trusses', joistFields: [] }))
    await addItem(opened.db, home, 10)
    await judgeTheAttic(home)
    expect((await openRules(home.atticId)).map(finding => finding.rule)).toEqual(['contents-without-storage'])
    expect(await statusOf(home.unitId)).toMatchObject({ loadState: 'over', utilisation: null })
  })

  it('clears everything once the attic is archived', async () => {
    const home = await inventHome(opened.db)
    await addItem(opened.db, home, 40)
    await judgeTheAttic(home)
    await opened.db.updateTable('attic').set({ archivedAt: new Date().toISOString() }).where('id', '=', home.atticId).execute()
    await judgeTheAttic(home)
    expect(await openRules(home.atticId)).toEqual([])
    expect(await statusOf(home.unitId)).toMatchObject({ atticCount: 0, loadState: null, openFindings: 0 })
  })
})

describe('judging a mark', () => {
  it('keeps value, width class and next reading on the mark', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home)
    await addReading(opened.db, home, mark, 0, 1.2)
    await judgeTheMark(mark)
    const row = await opened.db.selectFrom('mark').selectAll().where('id', '=', mark).executeTakeFirstOrThrow()
    expect(row).toMatchObject({ activity: 'too-few-readings', lastValue: 1.2, widthClass: 2, lastReadOn: today(), nextReadingOn: today(7), slopePerYear: null })
    expect((await openRules(mark)).map(finding => finding.rule)).toEqual(['new-mark'])
  })

  it('finds steady growth over many readings active, and says so in the unit’s summary', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home, { createdDaysAgo: 300 })
    for (let n = 0; n < 10; n += 1) await addReading(opened.db, home, mark, 300 - n * 30, 1 + n * 0.5, 0.1)
    await judgeTheMark(mark)
    const row = await opened.db.selectFrom('mark').selectAll().where('id', '=', mark).executeTakeFirstOrThrow()
    expect(row.activity).toBe('active')
    expect(row.slopePerYear).toBeCloseTo(0.5 / 30 * 365.25, 3)
    expect(await openRules(mark)).toContainEqual({ rule: 'mark-active', severity: 'attention' })
    expect(await statusOf(home.unitId)).toMatchObject({ openMarks: 1, activeMarks: 1 })
  })

  it('mails at once about a danger sign, and clears it when the report is corrected', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home)
    const report = await addReport(opened.db, home, mark, ['bits-falling'])
    await judgeTheMark(mark)
    expect(await openRules(mark)).toContainEqual({ rule: 'danger-sign', severity: 'urgent' })
    const mail = await mailOf(home.organisationId)
    expect(mail.map(message => message.toAddress).sort()).toEqual([await emailOf(opened.db, home.owner), await emailOf(opened.db, home.manager)].sort())
    expect(mail[0]).toMatchObject({ mailClass: 'safety', kind: 'new-finding' })
    expect(mail[0]!.subject).toMatch(/^Act now: /)
    expect(mail[0]!.textBody.replace(/\s+/g, ' ')).toContain('Leave the room, keep others out, and call for help.')

    await opened.db.updateTable('observation').set({ correctedAt: new Date().toISOString() }).where('id', '=', report).execute()
    await judgeTheMark(mark)
    expect((await openRules(mark)).map(finding => finding.rule)).not.toContain('danger-sign')
    expect(await mailOf(home.organisationId)).toHaveLength(2)
  })

  it('mails again when a later report brings the first danger sign', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home)
    await addReport(opened.db, home, mark)
    await judgeTheMark(mark)
    expect((await mailOf(home.organisationId)).map(message => message.kind)).toEqual(['new-finding', 'new-finding'])
    await addReport(opened.db, home, mark, ['water-dripping'])
    await judgeTheMark(mark)
    const later = (await mailOf(home.organisationId)).slice(2)
    expect(later.map(message => [message.kind, message.mailClass])).toEqual([['urgent-finding', 'safety'], ['urgent-finding', 'safety']])
  })

  it('calls a jump sudden from the second reading on', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home, { createdDaysAgo: 20 })
    await addReading(opened.db, home, mark, 14, 1)
    await addReading(opened.db, home, mark, 0, 3)
    await judgeTheMark(mark)
    expect(await openRules(mark)).toContainEqual({ rule: 'mark-sudden', severity: 'urgent' })
  })

  it('is judged again when the load above changes', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home)
    await addReading(opened.db, home, mark, 0, 1)
    await judgeTheMark(mark)
    expect((await openRules(mark)).map(finding => finding.rule)).toEqual(['new-mark'])
    await addSurvey(opened.db, home)
    await addItem(opened.db, home, 500)
    await judgeTheAttic(home)
    expect((await openRules(mark)).map(finding => finding.rule)).toEqual(['new-mark-under-load'])
  })

  it('asks for no more readings and has no findings once closed', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home)
    await addReading(opened.db, home, mark, 0, 1)
    await judgeTheMark(mark)
    await opened.db.updateTable('mark').set({ state: 'closed' }).where('id', '=', mark).execute()
    await judgeTheMark(mark)
    expect(await openRules(mark)).toEqual([])
    expect(await opened.db.selectFrom('mark').select('nextReadingOn').where('id', '=', mark).executeTakeFirstOrThrow()).toEqual({ nextReadingOn: null })
  })

  it('opens one finding when two judge at the same moment', async () => {
    const home = await inventHome(opened.db)
    const mark = await addMark(opened.db, home)
    await addReport(opened.db, home, mark, ['bits-falling'])
    await Promise.all([judgeTheMark(mark), judgeTheMark(mark), judgeTheMark(mark)])
    expect((await eventKinds(mark)).sort()).toEqual(['danger-sign opened', 'new-mark opened'])
    expect(await mailOf(home.organisationId)).toHaveLength(2)
  })
})
