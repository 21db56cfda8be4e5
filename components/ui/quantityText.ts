const halves: Record<string, number> = { '¼': 0.25, '½': 0.5, '¾': 0.75, '⅛': 0.125, '⅜': 0.375, '⅝': 0.625, '⅞': 0.875 }

/**
 * The number somebody typed: '1,940', '7.25', '9 1/4', '5½'. Null when empty, NaN when it is no number.
 * A comma counts only as a thousands mark, because '1,5' could mean either and a guess could be ten times off.
 */
export function quantityFromText(text: string): number | null {
  const typed = text.trim().replace('−', '-')
  if (typed === '') return null
  if (/^-?\d{1,3}(,\d{3})+(\.\d+)?$/.test(typed)) return Number(typed.replaceAll(',', ''))
  if (/^-?(\d+\.?\d*|\.\d+)$/.test(typed)) return Number(typed)

  const fraction = /^(-?)(\d+)?\s*(?:([¼½¾⅛⅜⅝⅞])|(?:(?<=^|\s|-)(\d+)\s*[/⁄]\s*(\d+)))$/.exec(typed)
  if (!fraction) return Number.NaN
  const [, sign, whole, glyph, top, bottom] = fraction
  if (bottom !== undefined && Number(bottom) === 0) return Number.NaN
  const part = glyph ? (halves[glyph] ?? Number.NaN) : Number(top) / Number(bottom)
  return (sign ? -1 : 1) * (Number(whole ?? 0) + part)
}

/** The shortest text that reads back as the same number. */
export function textFromQuantity(value: number | null | undefined): string {
  return value === null || value === undefined || Number.isNaN(value) ? '' : String(value)
}
