import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'

const root = fileURLToPath(new URL('../../../', import.meta.url))
const files = ['components', 'composables', 'layouts', 'pages', 'plugins', 'stores', 'middleware'].flatMap(filesIn)

function filesIn(folder: string): string[] {
  if (!existsSync(`${root}${folder}`)) return []
  return readdirSync(`${root}${folder}`, { recursive: true, encoding: 'utf8' }).filter(name => /\.(vue|ts)$/.test(name)).map(name => `${folder}/${name}`)
}

describe('imports of the screens', () => {
  it('reach shared/ by its alias: the page bundle cannot resolve a relative path to it', () => {
    expect(files.length).toBeGreaterThan(50)
    expect(files.filter(file => /from '(\.\.\/)+shared\//.test(readFileSync(`${root}${file}`, 'utf8')))).toEqual([])
  })

  it('bring the charting library only where a chart is shown', () => {
    const users = files.filter(file => /import (?!type)[^\n]*apexcharts|import\('[^']*apexcharts/.test(readFileSync(`${root}${file}`, 'utf8')))
    expect(users.every(file => file.endsWith('.client.vue')), users.join()).toBe(true)
    expect(users).toContain('components/ceiling/MarkChart.client.vue')
  })
})
