import { expect } from 'vitest'
import type { Db } from '../../../server/db/connect'
import { nowInstant } from '../../../server/utils/clock'
import { newId } from '../../../server/utils/newId'
import { makePasswordHash } from '../../../server/utils/passwords'
import { signIn, type Answer, type Client } from '../../support/client'
import { emailOf, inventPerson } from '../review/inventHome'
import type { OpenHome, Refusal } from '../review/openHome'

export interface Call { method: 'get' | 'post' | 'put' | 'patch', path: string, body?: object }

export function send<T>(client: Client, { method, path, body }: Call): Promise<Answer<T>> {
  return method === 'get' ? client.get<T>(path) : client[method]<T>(path, body ?? {})
}

const codeOf = async (client: Client, call: Call) => {
  const { status, body } = await send<Refusal>(client, call)
  return [status, body.data.code]
}

/** Signed out, a stranger, somebody known to whom it does not belong, and a role too small: each gets its own refusal. */
export async function expectGuarded({ as }: OpenHome, call: Call, tenant: 'too small' | 'allowed' | 'not theirs' = 'too small') {
  expect(await codeOf(as.nobody, call)).toEqual([401, 'not-signed-in'])
  expect(await codeOf(as.stranger, call)).toEqual([404, 'not-found'])
  expect(await codeOf(as.otherTenant, call)).toEqual([404, 'not-found'])
  if (tenant === 'too small') expect(await codeOf(as.tenant, call)).toEqual([403, 'not-allowed'])
  if (tenant === 'not theirs') expect(await codeOf(as.tenant, call)).toEqual([404, 'not-found'])
}

export async function expectUnsound(client: Client, call: Call, field: string) {
  const { status, body } = await send<Refusal>(client, call)
  expect([status, body.data.code]).toEqual([422, 'unsound-input'])
  expect(Object.keys(body.data.fields ?? {})).toContain(field)
}

const password = 'eleven straight battens'

/** An outside reviewer of this one unit, signed in. */
export async function bringEngineer(db: Db, url: string, home: OpenHome): Promise<Client> {
  const userId = await inventPerson(db, home.organisationId, 'engineer', 'Edda')
  await db.updateTable('appUser').set({ passwordHash: await makePasswordHash(password) }).where('id', '=', userId).execute()
  await db.insertInto('unitAccess').values({ id: newId(), organisationId: home.organisationId, unitId: home.unitId, userId, createdAt: nowInstant() }).execute()
  return signIn(url, { email: await emailOf(db, userId), password })
}

/** The newest entry about this thing. */
export const entryAbout = (db: Db, subjectId: string) =>
  db.selectFrom('recordEntry').selectAll().where('subjectId', '=', subjectId).orderBy('seq', 'desc').limit(1).executeTakeFirstOrThrow()
