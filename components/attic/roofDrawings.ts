import type { RoofTopic } from '~/shared/utils/messages/roofWords'

/** Our own line drawings on a sheet of 160 × 100. `wood` is cut or seen wood, `thin` what stands behind, `measure` a tape, `cut` what is missing. */
export type Tone = 'wood' | 'thin' | 'measure' | 'cut'
export interface Drawn { tone: Tone, d: string }
export interface Lettered { x: number, y: number, text: string }
export interface RoofSheet { drawn: readonly Drawn[], letters?: readonly Lettered[] }

const wood = (d: string): Drawn => ({ tone: 'wood', d })
const thin = (d: string): Drawn => ({ tone: 'thin', d })
const cut = (d: string): Drawn => ({ tone: 'cut', d })
/** A tape from one point to another, with a tick across each end. */
function tape(x1: number, y1: number, x2: number, y2: number): Drawn {
  const upright = x1 === x2
  const tick = (x: number, y: number) => upright ? `M${x - 4} ${y}h8` : `M${x} ${y - 4}v8`
  return { tone: 'measure', d: `M${x1} ${y1}L${x2} ${y2}${tick(x1, y1)}${tick(x2, y2)}` }
}
const box = (x: number, y: number, width: number, height: number) => `M${x} ${y}h${width}v${height}h${-width}Z`
const ends = (places: readonly number[], top = 40, deep = 44) => places.map(x => wood(box(x, top, 9, deep)))

export const ROOF_DRAWINGS: Record<RoofTopic, RoofSheet> = {
  'framing': {
    drawn: [
      wood('M6 66 40 26 74 66M10 66H70'), wood('M86 66 120 26 154 66M90 66H150'), wood('M120 26 108 66M120 26 132 66M103 46 108 66M137 46 132 66'),
      cut([[116, 25], [105, 62], [129, 62], [100, 44], [134, 44]].map(([x, y]) => box(x!, y!, 7, 5)).join('')),
    ],
    letters: [{ x: 40, y: 86, text: 'rafters' }, { x: 120, y: 86, text: 'trusses' }],
  },
  'clear-height': {
    drawn: [wood('M12 82 80 16 148 82M80 16 80 20'), wood(box(20, 80, 120, 6)), thin('M26 86V98M134 86V98'), tape(80, 24, 80, 79)],
    letters: [{ x: 102, y: 66, text: '42 in?' }],
  },
  'opening': {
    drawn: [wood(box(10, 14, 140, 8)), wood(box(10, 78, 140, 8)), wood(box(42, 22, 6, 56)), wood(box(112, 22, 6, 56)), thin('M48 22 112 78M112 22 48 78'), tape(48, 94, 112, 94), tape(132, 22, 132, 78)],
  },
  'bearing-wall': {
    drawn: [wood(box(8, 24, 144, 12)), wood('M10 36V98M22 36V98M10 36H22M138 36V98M150 36V98M138 36H150'), thin('M74 44V98M82 44V98M74 44H82')],
    letters: [{ x: 46, y: 72, text: 'bears' }, { x: 112, y: 72, text: 'divides' }],
  },
  'spacing': { drawn: [...ends([18, 72, 126]), thin('M10 84H150'), tape(22.5, 26, 76.5, 26), thin('M22.5 30V84M76.5 30V84')] },
  'span': {
    drawn: [wood(box(6, 26, 148, 12)), wood('M12 38V96M26 38V96M12 38H26M134 38V96M148 38V96M134 38H148'), tape(26, 62, 134, 62)],
  },
  'depth': {
    drawn: [wood(box(62, 12, 22, 70)), thin('M66 24Q74 34 80 22M66 44Q74 54 80 42M66 64Q74 74 80 62'), tape(104, 12, 104, 82), tape(62, 92, 84, 92)],
    letters: [{ x: 130, y: 50, text: 'depth' }, { x: 118, y: 95, text: 'thick' }],
  },
  'bearing-length': { drawn: [wood(box(58, 24, 94, 26)), wood('M40 50V98M82 50V98M40 50H98V58H40Z'), tape(58, 14, 98, 14), thin('M58 18V24M98 18V50')] },
  'stamp': {
    drawn: [wood(box(4, 20, 152, 42)), thin(box(42, 26, 76, 30)), { tone: 'measure', d: 'M60 78 60 52M57 57 60 52 63 57' }, { tone: 'measure', d: 'M98 78 98 52M95 57 98 52 101 57' }],
    letters: [{ x: 60, y: 46, text: 'SPF' }, { x: 96, y: 46, text: 'No.2' }, { x: 54, y: 92, text: 'wood' }, { x: 104, y: 92, text: 'grade' }],
  },
  'top-edge': {
    drawn: [...ends([12, 52], 34), wood(box(6, 27, 62, 7)), ...ends([96, 138], 34), wood(box(105, 34, 33, 44)), thin('M105 34 138 78M138 34 105 78')],
    letters: [{ x: 36, y: 96, text: 'deck' }, { x: 122, y: 96, text: 'block' }],
  },
  'deck': { drawn: [...ends([16, 58, 100, 140], 42), wood(box(8, 32, 70, 9)), wood(box(80, 32, 74, 9))] },
  'strongback': { drawn: [...ends([10, 42, 74, 106, 138], 50, 40), wood(box(4, 20, 150, 28)), thin('M14 30V44M46 30V44M78 30V44M110 30V44M142 30V44')] },
  'notch': {
    drawn: [wood('M4 36H30V50H50V36H156V74H4Z'), thin('M54.7 30V80M105.3 30V80'), tape(30, 26, 50, 26), tape(66, 36, 66, 50), cut('M30 36V50H50V36')],
    letters: [{ x: 80, y: 94, text: 'middle third' }],
  },
  'hole': { drawn: [wood(box(4, 26, 152, 50)), cut('M68 51a12 12 0 1 0 24 0a12 12 0 1 0 -24 0'), tape(68, 88, 92, 88), tape(104, 63, 104, 76), thin('M92 63H108')] },
}
