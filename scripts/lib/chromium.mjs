import { installDebianPackages, isExecutable, mayInstall } from './debianPackages.mjs'
import { Refusal } from './refusal.mjs'

export const chromiumPath = process.env.CHROMIUM_PATH || '/usr/bin/chromium'

/** @param {{ keeper: ReturnType<typeof import('./keeper.mjs').createKeeper>, say: (line: string) => void }} options */
export async function ensureChromium({ keeper, say }) {
  if (isExecutable(chromiumPath)) return
  if (process.env.CHROMIUM_PATH || !mayInstall()) {
    throw new Refusal(`The browser tests need Chromium at ${chromiumPath}. Install it with "sudo apt-get install chromium" (Debian), or set CHROMIUM_PATH to where it is.`)
  }
  await installDebianPackages({ packages: ['chromium'], keeper, say })
  if (!isExecutable(chromiumPath)) throw new Refusal(`The package chromium was installed, but ${chromiumPath} is not there.`)
}
