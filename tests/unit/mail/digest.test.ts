import { describe, expect, it } from 'vitest'
import type { DigestReader, DueLine, WaitingFinding } from '../../../server/db/queries/digest'
import { digestLinesFor, MOST_REMINDERS, type DigestPool } from '../../../server/utils/digestLines'
import { digestMail } from '../../../server/utils/digestMail'

const today = '2027-03-14'
const home = { unitId: 'unit-1', unitName: 'Upstairs', propertyName: '4 Alder Row' }
const finding = (changes: Partial<WaitingFinding> = {}): WaitingFinding => ({
  ...home, id: 'finding-1', changedAt: '2027-03-14T05:00:00.000Z',
  finding: {
    id: 'finding-1', rule: 'attic-load', severity: 'urgent', subject: { kind: 'attic', id: 'attic-1' }, adviceCode: 'stop-adding-and-unload',
    evidence: { state: 'over', totalLb: 5500, ratedTotalLb: 4800, ratedPsf: 20, utilisation: 1.15, chanceOfExceeding: 0.9 },
    openedAt: '2027-03-14T05:00:00.000Z', clearedAt: null, acknowledgedAt: null, acknowledgedReason: null, lookAgainOn: null,
  },
  ...changes,
})
const line = (changes: Partial<DueLine> = {}): DueLine => ({
  ...home, id: 'due-1', kind: 'reading', subjectId: 'mark-1', dueOn: '2027-03-12', createdAt: '2027-03-14T05:00:00.000Z', remindersSent: 0, lastRemindedOn: null, label: 'Crack by the door, Bedroom', ...changes,
})
const reader = (changes: Partial<DigestReader> = {}): DigestReader => ({
  userId: 'user-1', name: 'Oona', email: 'oona@plumbline.example', role: 'owner', unitsOfMeasure: 'us', lastDigestAt: null, unitIds: [], jobIds: [], ...changes,
})
const pool = (changes: Partial<DigestPool> = {}): DigestPool => ({ today, findings: [], due: [], reachableUnits: new Set(['unit-1']), ...changes })

describe('what one person is told', () => {
  it('is nothing when nothing is due and nothing was found', () => {
    expect(digestLinesFor(reader(), pool())).toBeUndefined()
  })

  it('is said once: nothing new since the last digest, no mail, until a week has passed', () => {
    const told = pool({ findings: [finding()] })
    expect(digestLinesFor(reader({ lastDigestAt: '2027-03-13T06:00:00.000Z' }), told)?.findings).toHaveLength(1)
    expect(digestLinesFor(reader({ lastDigestAt: '2027-03-14T06:00:00.000Z' }), told)).toBeUndefined()
    expect(digestLinesFor(reader({ lastDigestAt: '2027-03-07T06:00:00.000Z' }), pool({ findings: [finding({ changedAt: '2027-03-01T05:00:00.000Z' })] }))?.findings).toHaveLength(1)
  })

  it('asks a tenant for the readings of the own home only, three times at most, three days apart', () => {
    const tenant = reader({ role: 'tenant', unitIds: ['unit-1'] })
    expect(digestLinesFor(tenant, pool({ findings: [finding()], due: [line(), line({ id: 'due-2', unitId: 'unit-2' }), line({ id: 'due-3', kind: 'inventory' })] }))).toEqual({ findings: [], due: [line()] })
    expect(digestLinesFor(tenant, pool({ due: [line({ remindersSent: 1, lastRemindedOn: '2027-03-12' })] }))).toBeUndefined()
    expect(digestLinesFor(tenant, pool({ due: [line({ remindersSent: 1, lastRemindedOn: '2027-03-11' })] }))).toBeDefined()
    expect(digestLinesFor(tenant, pool({ due: [line({ remindersSent: MOST_REMINDERS, lastRemindedOn: '2027-03-01' })] }))).toBeUndefined()
  })

  it('gives staff the readings nobody else can be asked for, or nobody answered', () => {
    expect(digestLinesFor(reader(), pool({ due: [line()] }))).toBeUndefined()
    expect(digestLinesFor(reader(), pool({ due: [line()], reachableUnits: new Set() }))?.due).toHaveLength(1)
    expect(digestLinesFor(reader(), pool({ due: [line({ remindersSent: MOST_REMINDERS })] }))?.due).toHaveLength(1)
  })

  it('says a late thing once where a finding says it already', () => {
    const late = finding({ finding: { ...finding().finding, rule: 'reading-overdue', subject: { kind: 'mark', id: 'mark-1' }, evidence: { dueOn: '2027-03-01', daysLate: 13 }, adviceCode: 'take-reading' } })
    expect(digestLinesFor(reader(), pool({ findings: [late], due: [line()], reachableUnits: new Set() }))).toEqual({ findings: [late], due: [] })
  })

  it('shows trades their own due jobs', () => {
    const due = [line({ kind: 'job', subjectId: 'job-1' }), line({ id: 'due-2', kind: 'job', subjectId: 'job-2' })]
    expect(digestLinesFor(reader({ role: 'trades', jobIds: ['job-2'] }), pool({ due, findings: [finding()] }))).toEqual({ findings: [], due: [due[1]] })
  })
})

describe('the digest', () => {
  const checkpoint = { madeOn: today, chains: 3, entries: 42, hash: 'a'.repeat(64) }
  const mailTo = (who: DigestReader, changes: Partial<DigestPool> = {}) => digestMail({ reader: who, lines: digestLinesFor(who, pool(changes))!, today, organisationName: 'Plumbline Homes', checkpoint })

  it('groups by home, the home with the gravest matter first', () => {
    const quiet = { unitId: 'unit-2', unitName: 'Garden', propertyName: '9 Elm Row' }
    const mail = mailTo(reader(), { findings: [finding()], due: [line({ ...quiet, kind: 'inventory', subjectId: 'attic-2' }), line({ id: 'due-3', kind: 'inspection', subjectId: 'attic-1' })] })
    expect(mail.groups?.map(group => [group.heading, group.items.length])).toEqual([['4 Alder Row, Upstairs', 2], ['9 Elm Row, Garden', 1]])
    expect(mail.subject).toContain('3 things need you')
  })

  it('says what to do about what is urgent, before the list', () => {
    expect(mailTo(reader(), { findings: [finding()] }).paragraphs.join(' ')).toContain('Stop adding. Move the heaviest things to the bearing walls')
  })

  it('prints the checkpoint of the record for owners alone, and says how to switch it off', () => {
    const footer = (who: DigestReader) => mailTo(who, { findings: [finding()] }).footer.join(' ')
    expect(footer(reader())).toContain(checkpoint.hash)
    expect(footer(reader({ role: 'manager' }))).not.toContain(checkpoint.hash)
    expect(footer(reader())).toMatch(/switch it off at http\S+\/account/)
  })

  it('sends a tenant straight to the reading, with what to do if the ceiling looks dangerous', () => {
    const mail = mailTo(reader({ role: 'tenant', unitIds: ['unit-1'] }), { due: [line()] })
    expect(mail.groups?.[0]?.items[0]?.href).toMatch(/\/marks\/mark-1\/reading$/)
    expect(mail.footer.join(' ')).toContain('Leave the room')
    expect(mail.paragraphs.join(' ')).toContain('Nobody asks you to go into the attic')
  })
})
