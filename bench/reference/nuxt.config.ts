import { defineNuxtConfig } from 'nuxt/config'

/** The least that renders a page on the server and answers a route: what `npm run bench` holds the program against. */
export default defineNuxtConfig({
  devtools: { enabled: false },
  dir: { app: '.' },
  srcDir: '.',
  serverDir: 'server',
  buildDir: process.env.LATHKEY_BUILD_DIR,
  compatibilityDate: '2026-11-01',
  nitro: { preset: 'node-server', output: { dir: process.env.LATHKEY_OUTPUT_DIR } },
  telemetry: false,
})
