import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { addressOfPage, chartScripts, firstLoadScripts, layoutModule, pageModules, sumSentBytes } from './sizeFirstLoad.mjs'

/** kB = 1000 bytes. */
export const limitBytes = 125_000

/** The pages people meet on a phone, on the way or for the first time. */
export const limitedPages = ['/sign-in', '/report/[unitId]']

/**
 * @typedef {{ address: string, bytes: number, scripts: string[], charts: string[], isLimited: boolean }} PageSize
 * @typedef {{ pages: PageSize[], missing: string[] }} SizeReport
 */

/**
 * @param {{ root: string, outputDir: string, manifest: import('./sizeFirstLoad.mjs').ClientManifest }} options
 * @returns {SizeReport}
 */
export function measureSizes({ root, outputDir, manifest }) {
  const pages = pageModules(manifest).map((module) => {
    const source = join(root, module)
    const layout = layoutModule(existsSync(source) ? readFileSync(source, 'utf8') : '')
    const scripts = firstLoadScripts(manifest, [layout, module])
    const address = addressOfPage(module)
    return { address, scripts, bytes: sumSentBytes(outputDir, scripts), charts: chartScripts(outputDir, scripts), isLimited: limitedPages.includes(address) }
  })
  return { pages, missing: limitedPages.filter(address => !pages.some(page => page.address === address)) }
}

const kB = bytes => (bytes / 1000).toFixed(1)

function describePage({ address, bytes, scripts, isLimited }) {
  const verdict = isLimited ? (bytes < limitBytes ? ', within the limit' : ', OVER THE LIMIT') : ''
  return `  ${address.padEnd(28)} ${kB(bytes).padStart(6)} kB in ${scripts.length} files${verdict}`
}

/**
 * The lines to print, and whether all is within the limits.
 * @param {SizeReport} report
 * @param {{ isEveryPageWanted?: boolean }} [options]
 */
export function judgeSizes({ pages, missing }, { isEveryPageWanted = false } = {}) {
  const shown = pages.filter(page => isEveryPageWanted || page.isLimited)
  const withCharts = pages.filter(page => page.charts.length > 0)
  const lines = [
    `First-load JavaScript, sent with gzip (kB = 1000 bytes; less than ${kB(limitBytes)} kB asked of ${limitedPages.join(' and ')})`,
    ...shown.map(describePage),
    ...missing.map(address => `  ${address.padEnd(28)} IS NOT IN THIS BUILD`),
    withCharts.length === 0
      ? `  charts are in the first load of none of ${pages.length} pages`
      : `  CHARTS ARE IN THE FIRST LOAD OF ${withCharts.map(page => page.address).join(', ')}`,
  ]
  const isOver = pages.some(page => page.isLimited && page.bytes >= limitBytes)
  return { lines, isGood: !isOver && missing.length === 0 && withCharts.length === 0 }
}
