import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'

type Rgb = [number, number, number]

const css = readFileSync(new URL('../../../assets/css/main.css', import.meta.url), 'utf8')

function tokensIn(block: string): Record<string, Rgb> {
  return Object.fromEntries([...block.matchAll(/--([a-z]+): (\d+) (\d+) (\d+);/g)]
    .map(([, name, r, g, b]) => [name, [Number(r), Number(g), Number(b)] as Rgb]))
}

const light = tokensIn(css.slice(0, css.indexOf('prefers-color-scheme: dark')))
const dark = tokensIn(css.slice(css.indexOf('prefers-color-scheme: dark')))

/** Relative luminance and contrast ratio as defined by WCAG 2.2, https://www.w3.org/TR/WCAG22/#dfn-contrast-ratio */
function luminance([r, g, b]: Rgb): number {
  const [lr, lg, lb] = [r, g, b].map((value) => {
    const c = value / 255
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4
  }) as Rgb
  return 0.2126 * lr + 0.7152 * lg + 0.0722 * lb
}

function contrast(a: Rgb, b: Rgb): number {
  const [hi, lo] = [luminance(a), luminance(b)].sort((x, y) => y - x) as [number, number]
  return (hi + 0.05) / (lo + 0.05)
}

const textTokens = ['ink', 'graphite', 'verdigris', 'slate', 'ochre', 'madder']

describe('contrast of the tokens', () => {
  it('is computed as WCAG 2.2 defines it: black on white is 21, #777 on white is 4.48', () => {
    expect(contrast([0, 0, 0], [255, 255, 255])).toBeCloseTo(21, 5)
    expect(contrast([119, 119, 119], [255, 255, 255])).toBeCloseTo(4.478, 3)
  })

  for (const [scheme, tokens] of Object.entries({ light, dark })) {
    it(`reads all nine tokens of the ${scheme} scheme`, () => {
      expect(Object.keys(tokens).sort()).toEqual([...textTokens, 'paper', 'plaster', 'rule'].sort())
    })
    for (const ground of ['paper', 'plaster']) {
      for (const text of textTokens) {
        it(`of ${text} on ${ground} is at least 4.5 in the ${scheme} scheme`, () => {
          expect(contrast(tokens[text]!, tokens[ground]!)).toBeGreaterThanOrEqual(4.5)
        })
      }
    }
    it(`of paper text on a filled button is at least 4.5 in the ${scheme} scheme`, () => {
      expect(contrast(tokens.paper!, tokens.verdigris!)).toBeGreaterThanOrEqual(4.5)
      expect(contrast(tokens.paper!, tokens.madder!)).toBeGreaterThanOrEqual(4.5)
    })
  }
})
