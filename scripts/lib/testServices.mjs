import { buildIfStale } from './build.mjs'
import { startCluster } from './cluster.mjs'
import { makeTestFolder, testBuildFolders } from './testFolder.mjs'

/**
 * What API and browser tests stand on, as the environment they read.
 * @param {{ root: string, keeper: ReturnType<typeof import('./keeper.mjs').createKeeper>, say: (line: string) => void }} options
 */
export async function bringUpTestServices({ root, keeper, say }) {
  const folder = makeTestFolder(root, keeper)
  const [cluster, entry] = await Promise.all([
    startCluster({ folder, isForTests: true, keeper, say }),
    buildIfStale({ root, ...testBuildFolders(root), keeper, say }),
  ])
  return {
    TEST_DATABASE_ADMIN_URL: cluster.adminUrl,
    TEST_DATABASE_OWNER_URL: cluster.ownerUrl,
    TEST_DATABASE_APP_URL: cluster.appUrl,
    TEST_SERVER_ENTRY: entry,
    TEST_FOLDER: folder,
  }
}
