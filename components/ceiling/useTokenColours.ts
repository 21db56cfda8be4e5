import { onBeforeUnmount, onMounted, ref } from 'vue'
import type { ChartColours } from './markChartOptions'

const names = ['paper', 'rule', 'ink', 'graphite', 'slate', 'ochre', 'madder'] as const satisfies readonly (keyof ChartColours)[]

/** '#1e282d' from '30 40 45': the charting library mixes colours itself and reads no variables. */
export function hexFromToken(token: string): string {
  const parts = token.trim().split(/\s+/).map(Number)
  return parts.length === 3 && parts.every(part => part >= 0 && part <= 255)
    ? `#${parts.map(part => part.toString(16).padStart(2, '0')).join('')}`
    : '#000000'
}

/** The tokens of the scheme in force, read anew when it changes. Null until the page stands. */
export function useTokenColours() {
  const colours = ref<ChartColours | null>(null)
  const scheme = typeof window === 'undefined' ? null : window.matchMedia('(prefers-color-scheme: dark)')
  const read = () => {
    const style = getComputedStyle(document.documentElement)
    colours.value = Object.fromEntries(names.map(name => [name, hexFromToken(style.getPropertyValue(`--${name}`))])) as Record<keyof ChartColours, string>
  }
  onMounted(() => {
    read()
    scheme?.addEventListener('change', read)
  })
  onBeforeUnmount(() => scheme?.removeEventListener('change', read))
  return colours
}
