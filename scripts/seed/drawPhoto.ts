import sharp from 'sharp'
import type { DemoMark } from './scenario'

const WIDTH_PX = 960
const HEIGHT_PX = 720
/** Drawn scale of a close photo; a wide one shows the same ceiling from farther away. */
const PX_PER_MM = { close: 6, wide: 1.5 }

function wander(random: () => number, steps: number) {
  let y = HEIGHT_PX / 2
  return Array.from({ length: steps + 1 }, (_, i) => {
    y += (random() - 0.5) * 46
    return `${i === 0 ? 'M' : 'L'}${(60 + i * (WIDTH_PX - 120) / steps).toFixed(1)} ${y.toFixed(1)}`
  }).join(' ')
}

function markSvg(mark: DemoMark, value: number, view: 'wide' | 'close', random: () => number): string {
  const stroke = Math.max(1.2, value * PX_PER_MM[view])
  switch (mark.kind) {
    case 'crack': return `<path d="${wander(random, mark.shape === 'straight-line' ? 2 : 16)}" fill="none" stroke="#5a4a3c" stroke-width="${stroke.toFixed(1)}" stroke-linecap="round"/>`
    case 'nail-pops': return Array.from({ length: Math.round(value) }, (_, i) => `<circle cx="${140 + i * 120}" cy="${360 + (random() - 0.5) * 60}" r="15" fill="#efe7d6" stroke="#b9aa90" stroke-width="4"/>`).join('')
    case 'sag': return `<ellipse cx="480" cy="380" rx="330" ry="${120 + value * 3}" fill="#d8cdb8"/><ellipse cx="480" cy="360" rx="250" ry="${70 + value * 2}" fill="#e4dac6"/>`
    case 'stain': return `<ellipse cx="480" cy="360" rx="${value}" ry="${value * 0.7}" fill="#cdb489" stroke="#8f6d38" stroke-width="9"/>`
  }
}

/** A drawn ceiling, marked as a drawing: nobody may take it for a photo of a real home. */
export function drawPhoto(mark: DemoMark, value: number, view: 'wide' | 'close', random: () => number): Promise<Buffer> {
  const specks = Array.from({ length: 240 }, () => `<circle cx="${(random() * WIDTH_PX).toFixed(0)}" cy="${(random() * HEIGHT_PX).toFixed(0)}" r="${(0.5 + random() * 1.6).toFixed(1)}" fill="#d9cfbd"/>`).join('')
  const frame = view === 'wide' ? `<path d="M0 90 960 60M0 660 960 700" stroke="#b7a98f" stroke-width="8"/>` : ''
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH_PX}" height="${HEIGHT_PX}"><rect width="100%" height="100%" fill="#ece3d2"/>${specks}${frame}${markSvg(mark, value, view, random)}<text x="24" y="${HEIGHT_PX - 24}" font-family="sans-serif" font-size="24" fill="#7b6f5c">drawn for the demo, no real home</text></svg>`
  return sharp(Buffer.from(svg)).jpeg({ quality: 82 }).toBuffer()
}
