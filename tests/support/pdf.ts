import { execFile } from 'node:child_process'
import { mkdtemp, readFile, readdir, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'
import sharp from 'sharp'

const run = promisify(execFile)
const PT_PER_IN = 72

export interface ReadPdf {
  pages: number
  widthPt: number
  heightPt: number
  /** As a person would select and copy it. */
  text: string
}

async function withFile<T>(bytes: Uint8Array, work: (file: string, folder: string) => Promise<T>): Promise<T> {
  const folder = await mkdtemp(join(tmpdir(), 'paper-'))
  try {
    const file = join(folder, 'paper.pdf')
    await writeFile(file, bytes)
    return await work(file, folder)
  }
  finally {
    await rm(folder, { recursive: true, force: true })
  }
}

/** Read back with poppler: an outside program, so that our own drawing code cannot vouch for itself. */
export function readPdf(bytes: Uint8Array): Promise<ReadPdf> {
  return withFile(bytes, async (file) => {
    const [{ stdout: info }, { stdout: text }] = await Promise.all([run('pdfinfo', [file]), run('pdftotext', ['-layout', file, '-'])])
    const [, width, height] = /Page size:\s+([\d.]+) x ([\d.]+)/.exec(info) ?? []
    return { pages: Number(/Pages:\s+(\d+)/.exec(info)?.[1]), widthPt: Number(width), heightPt: Number(height), text: text.replaceAll(/[ \u00A0]+/g, ' ') }
  })
}

export interface RenderedPage { width: number, height: number, dpi: number, isDark: (xPt: number, yPt: number) => boolean, darkShare: (area: { xPt: number, yPt: number, widthPt: number, heightPt: number }) => number }

/** The pages as pictures, asked by points from the upper left corner. */
export function renderPdf(bytes: Uint8Array, dpi = 144): Promise<RenderedPage[]> {
  return withFile(bytes, async (file, folder) => {
    await run('pdftoppm', ['-r', String(dpi), '-gray', '-png', file, join(folder, 'page')])
    const names = (await readdir(folder)).filter(name => name.endsWith('.png')).sort()
    return Promise.all(names.map(async name => pageOf(await readFile(join(folder, name)), dpi)))
  })
}

async function pageOf(png: Buffer, dpi: number): Promise<RenderedPage> {
  const { data, info } = await sharp(png).greyscale().raw().toBuffer({ resolveWithObject: true })
  const at = (xPx: number, yPx: number) => data[yPx * info.width * info.channels + xPx * info.channels]! < 128
  const px = (pt: number) => Math.round(pt * dpi / PT_PER_IN)
  return {
    width: info.width, height: info.height, dpi,
    isDark: (xPt, yPt) => at(Math.floor(xPt * dpi / PT_PER_IN), Math.floor(yPt * dpi / PT_PER_IN)),
    darkShare: ({ xPt, yPt, widthPt, heightPt }) => {
      let dark = 0
      let all = 0
      for (let y = px(yPt); y < px(yPt + heightPt); y += 1) for (let x = px(xPt); x < px(xPt + widthPt); x += 1, all += 1) dark += at(x, y) ? 1 : 0
      return dark / all
    },
  }
}
