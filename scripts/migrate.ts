import { migrateToLatest } from '../server/db/migrate'

const url = process.env.DATABASE_OWNER_URL || process.env.DATABASE_URL
if (!url) throw new Error('Set DATABASE_OWNER_URL (or DATABASE_URL) to the database to bring up to date.')

const done = await migrateToLatest(url)
if (done.length > 0) console.log(`Database brought up to date: ${done.join(', ')}`)
