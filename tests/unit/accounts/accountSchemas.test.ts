import { describe, expect, it } from 'vitest'
import type { z } from 'zod'
import { ChangePasswordInput, EmailInput, NewPasswordInput, SignUpInput } from '../../../shared/schemas/account'
import { InvitationInput, NewcomerInput } from '../../../shared/schemas/invitation'

const wrongFields = (schema: z.ZodType, input: unknown) => {
  const result = schema.safeParse(input)
  return result.success ? {} : Object.fromEntries(result.error.issues.map(issue => [issue.path.join('.') || 'form', issue.message]))
}

describe('an e-mail address', () => {
  it('is kept in lower case without blanks around it', () => {
    expect(EmailInput.parse('  Ida@Home.EXAMPLE ')).toBe('ida@home.example')
  })

  it.each(['', 'ida', 'ida@', '@home.example', 'ida@home', 'ida home@x.example', `${'i'.repeat(250)}@home.example`])('is refused in plain words: %s', (text) => {
    expect(wrongFields(EmailInput, text).form).toMatch(/^(What is your e-mail address\?|Write an e-mail address|This address is too long)/)
  })
})

describe('a new password', () => {
  it.each([['9 characters', 'a'.repeat(9), false], ['10 characters', 'a'.repeat(10), true], ['200 characters', 'é'.repeat(200), true], ['201 characters', 'a'.repeat(201), false]])('of %s', (_, text, isSound) => {
    expect(NewPasswordInput.safeParse(text).success).toBe(isSound)
  })

  it('has no rules about kinds of characters', () => {
    for (const text of ['aaaaaaaaaa', '          ', '1234567890', 'ящик на чердаке']) expect(NewPasswordInput.safeParse(text).success).toBe(true)
  })

  it('differs from the present one', () => {
    expect(wrongFields(ChangePasswordInput, { current: 'three wet stones', password: 'three wet stones' })).toEqual({ password: 'This is the password you have now. Choose another one.' })
  })
})

describe('sign-up', () => {
  const sound = { organisationName: 'Thimble Lane', name: 'Olive', email: 'o@thimble.example' }

  it('passes over a time zone nobody knows, for nobody typed it', () => {
    expect(SignUpInput.parse({ ...sound, timeZone: 'Mars/Base' }).timeZone).toBeUndefined()
    expect(SignUpInput.parse({ ...sound, timeZone: 'America/Chicago' }).timeZone).toBe('America/Chicago')
  })

  it('names every missing field at once', () => {
    expect(Object.keys(wrongFields(SignUpInput, {})).sort()).toEqual(['email', 'name', 'organisationName'])
  })

  it('refuses fields it does not know, such as a role', () => {
    expect(SignUpInput.safeParse({ ...sound, role: 'owner' }).success).toBe(false)
  })
})

describe('an invitation', () => {
  const unitId = '01a22ff7-e65b-72b2-a356-95123143c11b'
  const tenant = { email: 't@home.example', role: 'tenant', unitId, tenantName: 'Tilda', startsOn: '2027-03-01' }

  it.each(['owner', 'manager', 'trades'])('as %s needs an address only', (role) => {
    expect(wrongFields(InvitationInput, { email: 'm@home.example', role })).toEqual({})
  })

  it('of a tenant needs the home, and a tenancy or what makes one', () => {
    expect(wrongFields(InvitationInput, tenant)).toEqual({})
    expect(wrongFields(InvitationInput, { email: tenant.email, role: 'tenant', unitId, tenancyId: unitId })).toEqual({})
    expect(Object.keys(wrongFields(InvitationInput, { email: tenant.email, role: 'tenant' }))).toEqual(['unitId', 'tenantName', 'startsOn'])
  })

  it('of an engineer needs the home and a last day', () => {
    expect(Object.keys(wrongFields(InvitationInput, { email: 'e@firm.example', role: 'engineer' }))).toEqual(['unitId', 'untilOn'])
  })

  it('tells a wrong address and a missing home in one go', () => {
    expect(Object.keys(wrongFields(InvitationInput, { email: 'nobody', role: 'engineer', untilOn: '2027-13-01' })).sort()).toEqual(['email', 'unitId', 'untilOn'])
  })

  it('refuses a tenancy that ends before it starts, and a role we do not have', () => {
    expect(wrongFields(InvitationInput, { ...tenant, endsOn: '2027-02-01' })).toEqual({ endsOn: 'The last day comes before the first.' })
    expect(wrongFields(InvitationInput, { ...tenant, role: 'admin' }).role).toBe('What will this person do here?')
    expect(wrongFields(InvitationInput, 'text').form).toBeDefined()
    expect(wrongFields(InvitationInput, null).form).toBeDefined()
  })

  it('is accepted by a new person with a name and a password', () => {
    expect(Object.keys(wrongFields(NewcomerInput, {})).sort()).toEqual(['name', 'password'])
  })
})
