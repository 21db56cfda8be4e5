import { buildIfStale } from './build.mjs'
import { startCluster } from './cluster.mjs'
import { testBuildFolders } from './testFolder.mjs'

/** @typedef {ReturnType<typeof import('./keeper.mjs').createKeeper>} Keeper */

/**
 * A database server for one run, as the environment the tests read.
 * @param {{ folder: string, keeper: Keeper, say: (line: string) => void }} options
 */
export async function bringUpTestCluster({ folder, keeper, say }) {
  const cluster = await startCluster({ folder, isForTests: true, keeper, say })
  return {
    TEST_DATABASE_ADMIN_URL: cluster.adminUrl,
    TEST_DATABASE_OWNER_URL: cluster.ownerUrl,
    TEST_DATABASE_APP_URL: cluster.appUrl,
    TEST_FOLDER: folder,
  }
}

/**
 * The built server the tests talk to.
 * @param {{ root: string, keeper: Keeper, say: (line: string) => void }} options
 * @returns {Promise<string>} its entry file
 */
export const buildForTests = ({ root, keeper, say }) => buildIfStale({ root, ...testBuildFolders(root), keeper, say })
