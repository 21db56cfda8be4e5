import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { judgeMark } from '../../../server/db/commands/judgeMark'
import { reviewOrganisation } from '../../../server/db/commands/reviewOrganisation'
import { newId } from '../../../server/utils/newId'
import { addItem, addMark, addReading, addSurvey, inventHome, inventPerson, openDatabase, today, type InventedHome } from './inventHome'

let opened: Awaited<ReturnType<typeof openDatabase>>
beforeAll(async () => { opened = await openDatabase() })
afterAll(() => opened.drop())

const digestsOf = (organisationId: string) => opened.db.selectFrom('message').selectAll().where('organisationId', '=', organisationId).where('kind', '=', 'digest').orderBy('createdAt').execute()
const plain = (text: string) => text.replace(/\s+/g, ' ')

/** A mark whose reading fell due, in a home with an attic over its rating. */
async function busyHome(): Promise<{ home: InventedHome, mark: string }> {
  const home = await inventHome(opened.db)
  await addSurvey(opened.db, home)
  await addItem(opened.db, home, 5500)
  const mark = await addMark(opened.db, home, { createdDaysAgo: 30 })
  await addReading(opened.db, home, mark, 30, 1)
  return { home, mark }
}

describe('the daily review', () => {
  it('judges everything, keeps what is due, makes the checkpoint and queues exactly one digest a person, however often it runs', async () => {
    const { home, mark } = await busyHome()
    const trades = await inventPerson(opened.db, home.organisationId, 'trades', 'Tor')
    const first = await reviewOrganisation(opened.db, home.organisationId)
    expect(first).toMatchObject({ kind: 'reviewed', counts: { units: 1, unitsDone: 1, attics: 1, marks: 1, digests: 3 } })
    expect(await reviewOrganisation(opened.db, home.organisationId)).toEqual({ kind: 'already reviewed' })
    expect(await reviewOrganisation(opened.db, home.organisationId, { askedBy: home.owner })).toMatchObject({ kind: 'reviewed', counts: { digests: 0 } })

    const digests = await digestsOf(home.organisationId)
    expect(digests.map(message => message.userId).sort()).toEqual([home.owner, home.manager, home.tenant].sort())
    expect(digests.map(message => message.userId)).not.toContain(trades)
    const due = await opened.db.selectFrom('dueItem').selectAll().where('unitId', '=', home.unitId).execute()
    expect(due).toMatchObject([{ kind: 'reading', subjectId: mark, dueOn: today(-23), remindersSent: 1, lastRemindedOn: today() }])
    const checkpoint = await opened.db.selectFrom('recordCheckpoint').selectAll().where('organisationId', '=', home.organisationId).execute()
    expect(checkpoint).toMatchObject([{ madeOn: today() }])
    const of = (userId: string) => plain(digests.find(message => message.userId === userId)!.textBody)
    expect(of(home.owner)).toContain(checkpoint[0]!.hash)
    expect(of(home.manager)).not.toContain(checkpoint[0]!.hash)
  })

  it('tells staff what to decide, gravest first, and a tenant only the readings of the own home', async () => {
    const { home, mark } = await busyHome()
    await reviewOrganisation(opened.db, home.organisationId)
    const digests = await digestsOf(home.organisationId)
    const text = (userId: string) => plain(digests.find(message => message.userId === userId)!.textBody)
    const staff = text(home.manager)
    expect(staff).toContain('4 Alder Row, Upstairs')
    expect(staff.indexOf('Urgent: Attic over its rating')).toBeGreaterThan(-1)
    expect(staff.indexOf('Urgent: Attic over its rating')).toBeLessThan(staff.indexOf('Reading overdue'))
    expect(staff).toMatch(/\/findings\/[0-9a-f-]{36}/)
    const tenant = text(home.tenant)
    expect(tenant).toContain(`/marks/${mark}/reading`)
    expect(tenant).not.toContain('rating')
    expect(tenant).toContain('Nobody asks you to go into the attic to measure.')
    for (const message of digests) expect(message.textBody).toContain('/account')
  })

  it('mails nobody when nothing is due and nothing is found', async () => {
    const home = await inventHome(opened.db)
    expect(await reviewOrganisation(opened.db, home.organisationId)).toMatchObject({ kind: 'reviewed', counts: { digests: 0 } })
    expect(await digestsOf(home.organisationId)).toEqual([])
  })

  it('mails nobody who switched the digest off', async () => {
    const { home } = await busyHome()
    await opened.db.updateTable('membership').set({ digest: false }).where('organisationId', '=', home.organisationId).where('userId', '!=', home.owner).execute()
    await reviewOrganisation(opened.db, home.organisationId)
    const digests = await digestsOf(home.organisationId)
    expect(digests.map(message => message.userId)).toEqual([home.owner])
    // Nobody in the home can be asked by mail, so the reading is for those who manage it.
    expect(plain(digests[0]!.textBody)).toContain('Reading overdue')
  })

  it('is one run when it is started twice at the same moment', async () => {
    const { home } = await busyHome()
    const answers = await Promise.all([1, 2, 3].map(() => reviewOrganisation(opened.db, home.organisationId)))
    expect(answers.filter(answer => answer.kind === 'reviewed')).toHaveLength(1)
    const runs = await opened.db.selectFrom('reviewRun').selectAll().where('organisationId', '=', home.organisationId).execute()
    expect(runs).toHaveLength(1)
    expect(runs[0]).toMatchObject({ reviewedOn: today(), error: null, askedBy: null })
    expect(await digestsOf(home.organisationId)).toHaveLength(3)
  })

  it('takes up a run of today that was cut off', async () => {
    const { home } = await busyHome()
    await opened.db.insertInto('reviewRun').values({ id: newId(), organisationId: home.organisationId, reviewedOn: today(), askedBy: null, startedAt: new Date().toISOString(), finishedAt: null, counts: '{}', error: 'cut off' }).execute()
    expect(await reviewOrganisation(opened.db, home.organisationId)).toMatchObject({ kind: 'reviewed' })
    expect(await opened.db.selectFrom('reviewRun').select(['error', 'finishedAt']).where('organisationId', '=', home.organisationId).execute()).toMatchObject([{ error: null, finishedAt: expect.any(String) }])
  })

  it('settles what was done, and counts reminders of what was not', async () => {
    const { home, mark } = await busyHome()
    await reviewOrganisation(opened.db, home.organisationId)
    await addReading(opened.db, home, mark, 0, 1.1)
    await opened.db.transaction().execute(trx => judgeMark(trx, { userId: home.tenant, name: 'Tess' }, mark))
    await reviewOrganisation(opened.db, home.organisationId, { askedBy: home.owner })
    expect(await opened.db.selectFrom('dueItem').select('settledAt').where('subjectId', '=', mark).execute()).toEqual([{ settledAt: expect.any(String) }])
  })

  it('tells owners once when nobody answers an urgent finding in time', async () => {
    const { home } = await busyHome()
    await reviewOrganisation(opened.db, home.organisationId)
    const unanswered = () => opened.db.selectFrom('message').selectAll().where('organisationId', '=', home.organisationId).where('kind', '=', 'unanswered-finding').execute()
    expect(await unanswered()).toEqual([])
    await opened.db.updateTable('finding').set({ openedAt: new Date(Date.now() - 80 * 3_600_000).toISOString() }).where('organisationId', '=', home.organisationId).where('rule', '=', 'attic-load').execute()
    for (let n = 0; n < 2; n += 1) await reviewOrganisation(opened.db, home.organisationId, { askedBy: home.owner })
    const mail = await unanswered()
    expect(mail.map(message => message.userId)).toEqual([home.owner])
    expect(plain(mail[0]!.textBody)).toContain('Local law governs')
  })

  it('brings an acknowledged finding back on its day to look again', async () => {
    const { home } = await busyHome()
    await reviewOrganisation(opened.db, home.organisationId)
    await opened.db.updateTable('finding').set({ acknowledgedAt: new Date().toISOString(), acknowledgedBy: home.owner, acknowledgedReason: 'Next week', lookAgainOn: today() })
      .where('organisationId', '=', home.organisationId).where('rule', '=', 'attic-load').execute()
    await reviewOrganisation(opened.db, home.organisationId, { askedBy: home.owner })
    const finding = await opened.db.selectFrom('finding').selectAll().where('organisationId', '=', home.organisationId).where('rule', '=', 'attic-load').executeTakeFirstOrThrow()
    expect(finding).toMatchObject({ acknowledgedAt: null, lookAgainOn: null, clearedAt: null })
    const events = await opened.db.selectFrom('findingEvent').select('kind').where('findingId', '=', finding.id).orderBy('happenedAt').execute()
    expect(events.map(event => event.kind)).toEqual(['opened', 'returned'])
  })

  it('finds a home where nobody can be reached', async () => {
    const home = await inventHome(opened.db)
    await opened.db.updateTable('appUser').set({ mailRefusedAt: new Date().toISOString() }).where('id', '=', home.tenant).execute()
    await reviewOrganisation(opened.db, home.organisationId)
    expect(await opened.db.selectFrom('finding').select(['rule', 'subjectKind', 'evidence']).where('unitId', '=', home.unitId).execute())
      .toEqual([{ rule: 'no-working-contact', subjectKind: 'unit', evidence: { reason: 'address-bounced' } }])
  })
})
