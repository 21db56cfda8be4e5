import { describe, expect, it } from 'vitest'
import { ABILITIES, abilitiesOf, reachOf, withinReach, type Ability, type Reach } from '../../../server/utils/policy'
import { ROLES, type Role } from '../../../shared/types/people'

type Row = [owner: Reach | '-', manager: Reach | '-', tenant: Reach | '-', trades: Reach | '-', engineer: Reach | '-']

/** Written out by hand from the roles of the design, so that a slip in the policy cannot repeat itself here. */
const EXPECTED: Record<Ability, Row> = {
  'use account': ['all', 'all', 'all', 'all', 'all'],
  'manage organisation': ['all', '-', '-', '-', '-'],
  'see settings': ['all', 'all', '-', '-', '-'],
  'manage people': ['all', 'all', '-', '-', '-'],
  'see portfolio': ['all', 'all', '-', '-', '-'],
  'see property': ['all', 'all', '-', '-', '-'],
  'edit homes': ['all', 'all', '-', '-', '-'],
  'see unit': ['all', 'all', 'own units', '-', 'own units'],
  'see attic': ['all', 'all', 'own units', '-', 'own units'],
  'edit attic': ['all', 'all', '-', '-', '-'],
  'confirm inventory': ['all', 'all', 'own units', '-', '-'],
  'sign terms': ['-', '-', 'own units', '-', '-'],
  'see mark': ['all', 'all', 'own units', '-', 'own units'],
  'edit mark': ['all', 'all', '-', '-', '-'],
  'report observation': ['all', 'all', 'own units', '-', '-'],
  'enter paper report': ['all', 'all', '-', '-', '-'],
  'record reading': ['all', 'all', 'own units', '-', '-'],
  'add photo': ['all', 'all', 'own units', '-', '-'],
  'see finding': ['all', 'all', '-', '-', 'own units'],
  'see notice': ['all', 'all', 'own units', '-', 'own units'],
  'raise notice': ['all', 'all', '-', '-', '-'],
  'acknowledge finding': ['all', 'all', '-', '-', '-'],
  'judge finding': ['all', 'all', '-', '-', '-'],
  'see ledger': ['all', 'all', '-', '-', '-'],
  'see unload trial': ['all', 'all', 'own units', '-', 'own units'],
  'run unload trial': ['all', 'all', '-', '-', '-'],
  'see job': ['all', 'all', 'own units', 'assigned', '-'],
  'edit job': ['all', 'all', '-', '-', '-'],
  'do job': ['all', 'all', '-', 'assigned', '-'],
  'see record': ['all', 'all', '-', '-', 'own units'],
  'run review': ['all', 'all', '-', '-', '-'],
  'see messages': ['all', 'all', '-', '-', '-'],
}
const COLUMNS: Role[] = ['owner', 'manager', 'tenant', 'trades', 'engineer']
const CELLS = Object.entries(EXPECTED).flatMap(([ability, row]) => COLUMNS.map((role, column) => ({ ability: ability as Ability, role, reach: row[column]! })))

describe('the policy table', () => {
  it('has exactly the abilities and roles written here', () => {
    expect([...ABILITIES].sort()).toEqual(Object.keys(EXPECTED).sort())
    expect([...ROLES].sort()).toEqual([...COLUMNS].sort())
  })

  it.each(CELLS)('$role × $ability is $reach', ({ ability, role, reach }) => {
    expect(reachOf(role, ability) ?? '-').toBe(reach)
  })

  it.each(COLUMNS.map((role, column) => ({ role, column })))('tells the screens of $role exactly what is in that column', ({ role, column }) => {
    const expected = Object.entries(EXPECTED).filter(([, row]) => row[column] !== '-').map(([ability]) => ability)
    expect(abilitiesOf(role).sort()).toEqual(expected.sort())
  })
})

const person = (role: Role, unitIds: string[] = []) => ({ userId: 'person-1', role, unitIds })
const thing = (unitId: string | null, assigneeUserId?: string | null) => ({ organisationId: 'organisation-1', unitId, assigneeUserId })

describe('withinReach', () => {
  it.each<[string, ReturnType<typeof person>, Ability, ReturnType<typeof thing>, 'yes' | 'role too small' | 'not theirs']>([
    ['an owner reaches any unit', person('owner'), 'edit attic', thing('unit-1'), 'yes'],
    ['a manager reaches what belongs to no unit', person('manager'), 'edit homes', thing(null), 'yes'],
    ['a manager does not manage the organisation', person('manager'), 'manage organisation', thing(null), 'role too small'],
    ['a tenant reaches their own unit', person('tenant', ['unit-1']), 'report observation', thing('unit-1'), 'yes'],
    ['a tenant does not learn of the unit next door', person('tenant', ['unit-1']), 'see unit', thing('unit-2'), 'not theirs'],
    ['a tenant may not edit their own attic', person('tenant', ['unit-1']), 'edit attic', thing('unit-1'), 'role too small'],
    ['a tenant without a running tenancy reaches nothing', person('tenant'), 'see unit', thing('unit-1'), 'not theirs'],
    ['a tenant does not learn of what belongs to no unit', person('tenant', ['unit-1']), 'see property', thing(null), 'not theirs'],
    ['an engineer reads the record of their unit', person('engineer', ['unit-1']), 'see record', thing('unit-1'), 'yes'],
    ['an engineer does not report observations', person('engineer', ['unit-1']), 'report observation', thing('unit-1'), 'role too small'],
    ['an engineer does not learn of another unit', person('engineer', ['unit-1']), 'see record', thing('unit-2'), 'not theirs'],
    ['trades do the job given to them', person('trades'), 'do job', thing('unit-1', 'person-1'), 'yes'],
    ['trades do not learn of a job given to somebody else', person('trades'), 'see job', thing('unit-1', 'person-2'), 'not theirs'],
    ['trades do not learn of a job given to nobody', person('trades'), 'see job', thing('unit-1', null), 'not theirs'],
    ['trades may not edit the job given to them', person('trades'), 'edit job', thing('unit-1', 'person-1'), 'role too small'],
    ['trades do not reach the unit their job is in', person('trades'), 'see unit', thing('unit-1'), 'not theirs'],
    ['a tenant sees a job in their unit whoever does it', person('tenant', ['unit-1']), 'see job', thing('unit-1', 'person-2'), 'yes'],
  ])('%s', (_, actor, ability, about, answer) => {
    expect(withinReach(actor, ability, about)).toBe(answer)
  })

  it('never answers yes where the table has nothing, whoever owns the thing', () => {
    for (const role of ROLES) {
      for (const ability of ABILITIES) {
        if (reachOf(role, ability)) continue
        expect(withinReach(person(role, ['unit-1']), ability, thing('unit-1', 'person-1'))).toBe('role too small')
      }
    }
  })
})
