import { fileURLToPath } from 'node:url'

/** Fonts of the printed papers; a PDF takes woff, with its letters in several files by alphabet. */
const fontFolder = fileURLToPath(new URL('node_modules/@fontsource/nunito-sans/files', import.meta.url))

/** Domain files name their siblings with the ending, so that any TypeScript runner loads them. */
const compilerOptions = { noUncheckedIndexedAccess: true, allowImportingTsExtensions: true }

export default defineNuxtConfig({
  modules: ['@nuxt/eslint', '@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils'],
  components: [{ path: '~/components', pathPrefix: false }],
  devtools: { enabled: false },
  app: {
    head: {
      htmlAttrs: { lang: 'en' },
      titleTemplate: '%s · Lathkey',
      title: 'Lathkey',
      meta: [
        { name: 'viewport', content: 'width=device-width, initial-scale=1' },
        { name: 'color-scheme', content: 'light dark' },
      ],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/favicon.svg' }],
    },
  },
  css: ['~/assets/css/main.css', '~/assets/css/print.css'],
  runtimeConfig: {
    session: {
      name: 'lathkey-session', password: '', maxAge: 60 * 60 * 24 * 30,
      // Browsers take Secure on loopback too; plain http elsewhere needs NUXT_SESSION_COOKIE_SECURE=false.
      cookie: { sameSite: 'lax', httpOnly: true, secure: true, path: '/' },
    },
  },
  dir: { app: '.', shared: 'shared', public: 'public', modules: 'modules' },
  srcDir: '.',
  serverDir: 'server',
  // Tests build into folders of their own, so that a running program keeps its files.
  buildDir: process.env.LATHKEY_BUILD_DIR || '.nuxt',
  ignore: ['.data/**', '.test/**', '.output/**', 'tests/**', 'fakes/**', 'scripts/**', 'bench/**', 'coverage/**'],
  compatibilityDate: '2026-11-01',
  nitro: {
    preset: 'node-server',
    output: { dir: process.env.LATHKEY_OUTPUT_DIR || '.output' },
    typescript: { tsConfig: { compilerOptions } },
    serverAssets: [{ baseName: 'fonts', dir: fontFolder, pattern: 'nunito-sans-{latin,latin-ext,cyrillic,vietnamese}-{400,600,800}-normal.woff' }],
    compressPublicAssets: { gzip: true, brotli: true },
  },
  typescript: {
    strict: true,
    tsConfig: { compilerOptions },
    sharedTsConfig: { compilerOptions },
    nodeTsConfig: { compilerOptions },
  },
  telemetry: false,
  auth: { loadStrategy: 'none' },
  eslint: { config: { stylistic: { semi: false, quotes: 'single', commaDangle: 'always-multiline' } } },
  tailwindcss: { viewer: false, cssPath: '~/assets/css/main.css', exposeConfig: false },
})
