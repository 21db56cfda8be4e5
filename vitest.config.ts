import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vitest/config'
import { fileURLToPath } from 'node:url'

const root = fileURLToPath(new URL('.', import.meta.url))

/** One project per kind of test: `npx vitest run --project unit`. */
export default defineConfig({
  test: {
    projects: [
      {
        plugins: [vue()],
        resolve: { alias: { '~': root, '#shared': `${root}shared` } },
        test: { name: 'unit', include: ['tests/unit/**/*.test.ts', 'tests/reference/**/*.test.ts'], environment: 'node', testTimeout: 60_000 },
      },
      {
        resolve: { alias: { '~': root, '#shared': `${root}shared` } },
        test: {
          name: 'api', include: ['tests/api/**/*.test.ts', 'tests/fakes/**/*.test.ts'], environment: 'node',
          testTimeout: 60_000, hookTimeout: 120_000, maxWorkers: 2, globalSetup: ['tests/support/globalSetup.ts'],
        },
      },
      {
        resolve: { alias: { '~': root, '#shared': `${root}shared` } },
        test: {
          name: 'browser', include: ['tests/browser/**/*.test.ts'], environment: 'node',
          testTimeout: 180_000, hookTimeout: 180_000, maxWorkers: 2, globalSetup: ['tests/support/globalSetup.ts'],
        },
      },
    ],
  },
})
