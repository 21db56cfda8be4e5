import { Migrator } from 'kysely'
import { connect } from './connect'
import { followChanges } from './followChanges'
import { migrations } from './migrations/all'

/** Numbers are given out ahead, so that a lower one may land after a higher one has run. */
const inAnyOrder = { allowUnorderedMigrations: true } as const

/** Brings the database to the newest schema. Needs the owning role; throws with the failed migration's name. */
export async function migrateToLatest(ownerUrl: string): Promise<string[]> {
  const { db, close } = connect(ownerUrl, { max: 1 })
  try {
    const migrator = new Migrator({ db, provider: { getMigrations: async () => migrations }, ...inAnyOrder })
    const { error, results = [] } = await migrator.migrateToLatest()
    if (error) {
      const failed = results.find(result => result.status === 'Error')?.migrationName ?? 'the first step'
      throw new Error(`Migration failed at ${failed}`, { cause: error })
    }
    if (results.length > 0) await followChanges(db)
    return results.map(result => result.migrationName)
  }
  finally {
    await close()
  }
}

/** Names of migrations this program knows that the database has not run. */
export async function pendingMigrations(url: string): Promise<string[]> {
  const { db, close } = connect(url, { max: 1 })
  try {
    const migrator = new Migrator({ db, provider: { getMigrations: async () => migrations }, ...inAnyOrder })
    return (await migrator.getMigrations()).filter(migration => !migration.executedAt).map(migration => migration.name)
  }
  finally {
    await close()
  }
}
