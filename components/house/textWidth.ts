const narrow = /[iljtfrI.,:;'’|!()[\] ·]/
const wide = /[mwMQO@%]/
const widest = /[W\u2000-\uffff]/
const capital = /[A-Z]/

/**
 * Width of a text set in Nunito Sans 600, in units of the drawing. An estimate a little on the wide side,
 * so that what fits here fits on screen (measured from the font's own advance widths, see the test).
 */
export function textWidth(text: string, fontPx: number): number {
  let em = 0
  for (const letter of text) {
    if (narrow.test(letter)) em += 0.42
    else if (widest.test(letter)) em += 1.12
    else if (wide.test(letter)) em += 0.98
    else if (capital.test(letter)) em += 0.76
    else em += 0.62
  }
  return em * fontPx
}

/** The text, or as much of it as fits with an ellipsis; empty when not even three letters do. */
export function fitText(text: string, fontPx: number, roomPx: number): string {
  if (textWidth(text, fontPx) <= roomPx) return text
  for (let length = text.length - 1; length >= 3; length--) {
    const cut = `${text.slice(0, length).trimEnd()}…`
    if (textWidth(cut, fontPx) <= roomPx) return cut
  }
  return ''
}
