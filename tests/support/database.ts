import { randomBytes } from 'node:crypto'
import { inject } from 'vitest'
import { grantOnDatabase } from '../../scripts/lib/roles.mjs'
import { asAdmin, templateName, withDatabase } from './template'

export interface TestDatabase {
  name: string
  /** The role that owns tables and migrates. */
  ownerUrl: string
  /** The application's own role: no update or delete on the record. */
  appUrl: string
  /** May do anything, for setting up what the application itself cannot. */
  adminUrl: string
  /** Cuts every connection to it, as a restart of the server would. */
  cutConnections: () => Promise<void>
  /** Refuses new connections (and cuts present ones), or takes them again. */
  setReachable: (isReachable: boolean) => Promise<void>
  drop: () => Promise<void>
}

/** A fresh database with the newest schema and no rows, or a copy of another one that nobody is connected to. */
export async function cloneDatabase({ from = templateName, as: name = `test_${randomBytes(8).toString('hex')}` } = {}): Promise<TestDatabase> {
  const services = inject('testServices')
  await asAdmin(services.adminUrl, async (client) => {
    await client.query(`create database ${name} template ${from} owner lathkey_owner`)
    await grantOnDatabase(client, name)
  })
  const cutConnections = () => asAdmin(services.adminUrl, async (client) => {
    await client.query('select pg_terminate_backend(pid) from pg_stat_activity where datname = $1', [name])
  })
  return {
    name,
    ownerUrl: withDatabase(services.ownerUrl, name),
    appUrl: withDatabase(services.appUrl, name),
    adminUrl: withDatabase(services.adminUrl, name),
    cutConnections,
    setReachable: async (isReachable) => {
      await asAdmin(services.adminUrl, client => client.query(`alter database ${name} with allow_connections ${isReachable}`))
      if (!isReachable) await cutConnections()
    },
    drop: async () => {
      await asAdmin(services.adminUrl, client => client.query(`drop database if exists ${name} with (force)`))
    },
  }
}
