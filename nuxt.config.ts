export default defineNuxtConfig({
  compatibilityDate: '2026-11-01',
  srcDir: '.',
  serverDir: 'server',
  dir: { app: '.', shared: 'shared', public: 'public', modules: 'modules' },
  ignore: ['.data/**', '.test/**', '.output/**', 'tests/**', 'fakes/**', 'scripts/**', 'coverage/**'],
  modules: ['@nuxt/eslint', '@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils'],
  components: [{ path: '~/components', pathPrefix: false }],
  css: ['~/assets/css/main.css', '~/assets/css/print.css'],
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
  runtimeConfig: {
    session: { name: 'lathkey-session', password: '', maxAge: 60 * 60 * 24 * 30 },
  },
  typescript: { strict: true, tsConfig: { compilerOptions: { noUncheckedIndexedAccess: true } } },
  devtools: { enabled: false },
  telemetry: false,
  tailwindcss: { viewer: false, cssPath: '~/assets/css/main.css', exposeConfig: false },
  eslint: { config: { stylistic: { semi: false, quotes: 'single', commaDangle: 'always-multiline' } } },
  nitro: {
    preset: 'node-server',
    compressPublicAssets: { gzip: true, brotli: true },
  },
})
