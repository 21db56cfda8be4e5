import { join } from 'node:path'
import { bringUpMail, bringUpServer, demoSignIns, migrate, seedWhenEmpty } from './bringUp.mjs'
import { buildIfStale } from './build.mjs'
import { startCluster } from './cluster.mjs'
import { buildReference } from './benchReference.mjs'
import { findFreePort } from './ports.mjs'
import { Refusal } from './refusal.mjs'
import { addressOf, readSettings, serverEnvironment } from './settings.mjs'
import { testBuildFolders } from './testFolder.mjs'

const host = '127.0.0.1'

/** The planner knows the demo's tables as it would after a day of use. @param {string} adminUrl @param {string} appUrl */
async function settleDatabase(adminUrl, appUrl) {
  const { default: pg } = await import('pg')
  const url = new URL(adminUrl)
  url.pathname = new URL(appUrl).pathname
  const client = new pg.Client({ connectionString: url.href })
  await client.connect()
  try {
    await client.query('vacuum analyze')
    const { rows: [organisation] } = await client.query('select id from organisation order by created_at limit 1')
    if (!organisation) throw new Refusal('The demo was not made: there is no organisation.')
    return organisation.id
  }
  finally {
    await client.end()
  }
}

/**
 * A cluster with the demo, the built program and the reference on it, both at rest.
 * @param {object} options
 * @param {string} options.root
 * @param {string} options.folder of this run
 * @param {string[]} options.nodeOptions for the program's own process, as --cpu-prof
 * @param {ReturnType<typeof import('./keeper.mjs').createKeeper>} options.keeper
 * @param {(line: string) => void} options.say
 */
export async function bringUpBench({ root, folder, nodeOptions, keeper, say }) {
  const entry = await buildIfStale({ root, ...testBuildFolders(root), keeper, say })
  const referenceEntry = await buildReference({ root, keeper, say })
  const cluster = await startCluster({ folder, isForTests: true, keeper, say })
  await migrate({ root, keeper, env: { ...process.env, DATABASE_OWNER_URL: cluster.ownerUrl } })
  const settings = readSettings(root, { DATA_DIR: join(folder, 'data') })
  const port = await findFreePort()
  const mail = await bringUpMail({ root, dataDir: settings.dataDir, webPort: await findFreePort(), keeper })
  const env = { ...serverEnvironment(settings, { ...cluster, smtpUrl: mail.smtpUrl, port }), NODE_ENV: 'production' }
  say('Making the demo …')
  await seedWhenEmpty({ root, keeper, env })
  const organisationId = await settleDatabase(cluster.adminUrl, cluster.appUrl)
  const address = addressOf(host, port)
  const server = await bringUpServer({ command: [...nodeOptions, entry], cwd: root, env, address, keeper, timeoutMs: 45_000 })
  const referencePort = await findFreePort()
  const referenceAddress = addressOf(host, referencePort)
  const referenceEnv = {
    PATH: process.env.PATH, NODE_ENV: 'production', HOST: host, PORT: String(referencePort), DATABASE_URL: cluster.appUrl, REFERENCE_ORGANISATION_ID: organisationId,
  }
  const reference = await bringUpServer({ command: [referenceEntry], cwd: root, env: referenceEnv, address: referenceAddress, keeper, timeoutMs: 45_000 })
  return {
    program: { address, pid: server.child.pid },
    reference: { address: referenceAddress, pid: reference.child.pid },
    owner: ownerOf(demoSignIns(settings.dataDir)),
  }
}

function ownerOf(signIns) {
  const owner = signIns.find(({ role }) => role?.toLowerCase().startsWith('owner')) ?? signIns[0]
  if (!owner) throw new Refusal('The demo named nobody to sign in as.')
  return owner
}
