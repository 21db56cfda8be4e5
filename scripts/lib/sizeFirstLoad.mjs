import { existsSync, readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { Refusal } from './refusal.mjs'

/**
 * What a built page loads, as far as it is told here; made by the build, read by the server when it writes a page's head.
 * @typedef {{ file: string, resourceType?: string }} Resource
 * @typedef {{ entrypoints: string[], dependencies: Record<string, { preload: Record<string, Resource> }> }} ClientManifest
 */

/** A class name of the chart library, which survives minification. */
export const chartMarker = 'apexcharts-canvas'

/** @param {string} outputDir @returns {Promise<ClientManifest>} */
export async function readClientManifest(outputDir) {
  const file = join(outputDir, 'server/chunks/build/client.precomputed.mjs')
  if (!existsSync(file)) throw new Refusal(`${outputDir} holds no build. Run "npm run build" first, or name the folder of a build.`)
  const { default: manifest } = await import(`${pathToFileURL(file).href}?read=${statSync(file).mtimeMs}`)
  return manifest
}

/**
 * The scripts that the server-rendered page names in its head, as `<script type="module" src>` or `modulepreload`:
 * the entry's, the layout's and the page's own, with all they import statically. What is prefetched for later is not among them.
 * @param {ClientManifest} manifest
 * @param {string[]} modules of the layout and the page
 */
export function firstLoadScripts(manifest, modules) {
  const resources = [...manifest.entrypoints, ...modules].flatMap((module) => {
    const known = manifest.dependencies[module]
    if (!known) throw new Refusal(`${module} is not in this build.`)
    return Object.values(known.preload)
  })
  return [...new Set(resources.filter(({ resourceType }) => resourceType === 'script').map(({ file }) => file))].sort()
}

/**
 * Bytes of the body that the server sends to a browser that takes gzip. What the build left uncompressed goes as it is.
 * @param {string} outputDir
 * @param {string} script
 */
export function sentBytes(outputDir, script) {
  const file = join(outputDir, 'public/_nuxt', script)
  return statSync(existsSync(`${file}.gz`) ? `${file}.gz` : file).size
}

/** @param {string} outputDir @param {string[]} scripts */
export const sumSentBytes = (outputDir, scripts) => scripts.reduce((sum, script) => sum + sentBytes(outputDir, script), 0)

/** @param {string} outputDir @param {string[]} scripts those of them that carry the chart library */
export const chartScripts = (outputDir, scripts) =>
  scripts.filter(script => readFileSync(join(outputDir, 'public/_nuxt', script), 'utf8').includes(chartMarker))

/** @param {ClientManifest} manifest its pages' modules, as "pages/sign-in.vue" */
export const pageModules = manifest => Object.keys(manifest.dependencies).filter(module => /^pages\/.*\.vue$/.test(module)).sort()

/** The address a page's file stands for. @param {string} module */
export const addressOfPage = module => module.replace(/^pages/, '').replace(/\.vue$/, '').replace(/\/index$/, '') || '/'

/** The layout a page's source asks for; Nuxt takes "default" when it asks for none. @param {string} source */
export function layoutModule(source) {
  const [, name = 'default'] = /definePageMeta\([\s\S]*?\blayout:\s*'([^']+)'/.exec(source) ?? []
  return `layouts/${name}.vue`
}
