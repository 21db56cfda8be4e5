import withNuxt from './.nuxt/eslint.config.mjs'

export default withNuxt(
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      'max-lines': ['error', { max: 300, skipBlankLines: false, skipComments: false }],
      'vue/multi-word-component-names': 'off',
      '@stylistic/max-statements-per-line': ['error', { max: 2 }],
    },
  },
  {
    name: 'lathkey/shared-knows-nobody',
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-imports': ['error', {
        patterns: [
          { group: ['vue', 'vue-*', '@vue/*', 'nuxt*', '#*', '~/*', '@/*', 'h3', 'kysely', 'pg'], message: 'shared/ imports no Vue, no Nitro, no database; domain files import each other by relative path.' },
          { group: ['**/server/**', '**/components/**', '**/composables/**', '**/pages/**', '**/stores/**'], message: 'Nothing in shared/ knows who calls it.' },
        ],
      }],
    },
  },
  {
    name: 'lathkey/arrows-run-one-way',
    files: ['pages/**/*.vue', 'components/**/*.{ts,vue}', 'composables/**/*.ts', 'stores/**/*.ts', 'layouts/**/*.vue'],
    rules: {
      'no-restricted-imports': ['error', {
        patterns: [
          { group: ['**/server/**', 'kysely', 'pg'], message: 'The browser reaches the server through its routes.' },
          { group: ['zod', '**/shared/schemas/**', '#shared/schemas/**'], allowTypeImports: true, message: 'Load schemas lazily with () => import(…): first-load budget.' },
        ],
      }],
    },
  },
)
