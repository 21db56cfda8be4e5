import { setTimeout as wait } from 'node:timers/promises'

async function connect(url) {
  const { default: pg } = await import('pg')
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 2_000 })
  client.on('error', () => { /* the query under way reports it */ })
  await client.connect()
  return client
}

/**
 * @param {string} url
 * @param {() => boolean} isRunning stop waiting when the server has gone
 */
export async function waitForDatabase(url, isRunning, timeoutMs = 30_000) {
  const deadline = Date.now() + timeoutMs
  while (isRunning() && Date.now() < deadline) {
    try {
      await (await connect(url)).end()
      return true
    }
    catch {
      await wait(50)
    }
  }
  return false
}

/**
 * Two roles: one owns and migrates; the application's own gets its rights on tables from the migrations,
 * and may create a schema of its own for the job queue.
 * @param {{ adminUrl: string, ownerPassword: string, appPassword: string, database?: string }} options
 */
export async function ensureRolesAndDatabase({ adminUrl, ownerPassword, appPassword, database = 'lathkey' }) {
  const client = await connect(adminUrl)
  try {
    for (const [role, password] of [['lathkey_owner', ownerPassword], ['lathkey_app', appPassword]]) {
      const { rowCount } = await client.query('select from pg_roles where rolname = $1', [role])
      await client.query(`${rowCount ? 'alter' : 'create'} role ${role} login password ${client.escapeLiteral(password)}`)
    }
    const { rowCount } = await client.query('select from pg_database where datname = $1', [database])
    if (!rowCount) await client.query(`create database ${client.escapeIdentifier(database)} owner lathkey_owner`)
    await grantOnDatabase(client, database)
  }
  finally {
    await client.end()
  }
}

/**
 * @param {import('pg').Client} client
 * @param {string} database
 */
export async function grantOnDatabase(client, database) {
  const name = client.escapeIdentifier(database)
  await client.query(`revoke all on database ${name} from public`)
  await client.query(`grant connect, create, temporary on database ${name} to lathkey_app`)
}
