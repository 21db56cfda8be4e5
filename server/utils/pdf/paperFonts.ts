import ranges from '@fontsource/nunito-sans/unicode.json'

export const PAPER_WEIGHTS = [400, 600, 800] as const
export type PaperWeight = typeof PAPER_WEIGHTS[number]

/** The alphabets that are shipped, the usual one first; ranges as the font's makers give them. */
const SUBSETS = ['latin', 'latin-ext', 'cyrillic', 'vietnamese'] as const
export type PaperSubset = typeof SUBSETS[number]

export const fontFile = (subset: PaperSubset, weight: PaperWeight) => `nunito-sans-${subset}-${weight}-normal.woff`
export const FONT_FILES = SUBSETS.flatMap(subset => PAPER_WEIGHTS.map(weight => fontFile(subset, weight)))

/** Font bytes by file name. */
export type PaperFonts = ReadonlyMap<string, Uint8Array>

const spans = SUBSETS.map(subset => ({
  subset,
  parts: ranges[subset].split(',').map((part) => {
    const [from = '', to = from] = part.replace('U+', '').split('-')
    return [Number.parseInt(from, 16), Number.parseInt(to, 16)] as const
  }),
}))

/** The part of the font that has this letter; undefined for letters no shipped font can draw. */
export function subsetOf(codePoint: number): PaperSubset | undefined {
  return spans.find(({ parts }) => parts.some(([from, to]) => codePoint >= from && codePoint <= to))?.subset
}

/** Signs the font has no drawing for, written out. */
const WRITTEN_OUT: Record<string, string> = { '⅝': '5/8', '⅜': '3/8', '⅞': '7/8', '⅛': '1/8', '≥': 'at least ', '≤': 'at most ', '\u202F': '\u00A0', '\t': ' ' }

export interface TextRun { subset: PaperSubset, text: string }

/** Text cut where the alphabet changes. A letter that cannot be drawn becomes a question mark, never an empty box. */
export function textRuns(text: string): TextRun[] {
  const runs: TextRun[] = []
  for (const letter of Array.from(text.normalize('NFC')).flatMap(sign => Array.from(WRITTEN_OUT[sign] ?? sign))) {
    const known = subsetOf(letter.codePointAt(0)!)
    const last = runs.at(-1)
    const subset = letter === ' ' && last ? last.subset : known ?? 'latin'
    if (last?.subset === subset) last.text += known ? letter : '?'
    else runs.push({ subset, text: known ? letter : '?' })
  }
  return runs
}
