import type { Config } from 'tailwindcss'

const token = (name: string) => `rgb(var(--${name}) / <alpha-value>)`

export default {
  content: ['./app.vue', './error.vue', './pages/**/*.vue', './layouts/**/*.vue', './components/**/*.{vue,ts}', './composables/**/*.ts'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: token('paper'),
      plaster: token('plaster'),
      rule: token('rule'),
      ink: token('ink'),
      graphite: token('graphite'),
      verdigris: token('verdigris'),
      slate: token('slate'),
      ochre: token('ochre'),
      madder: token('madder'),
    },
    fontFamily: { sans: ['"Nunito Sans"', 'system-ui', 'sans-serif'] },
    fontSize: {
      'sm': ['0.9375rem', '1.4'],
      'base': ['1rem', '1.5'],
      'lg': ['1.125rem', '1.45'],
      'xl': ['1.375rem', '1.35'],
      '2xl': ['1.75rem', '1.25'],
      '3xl': ['2.25rem', '1.2'],
    },
    borderRadius: { none: '0', DEFAULT: '2px', full: '9999px' },
    boxShadow: { none: 'none' },
  },
} satisfies Config
