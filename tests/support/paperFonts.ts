import { readFileSync } from 'node:fs'
import { resolve } from 'node:path'
import { FONT_FILES, type PaperFonts } from '../../server/utils/pdf/paperFonts'

const folder = resolve(import.meta.dirname, '../../node_modules/@fontsource/nunito-sans/files')

/** The fonts as the build takes them in, for papers drawn without a server. */
export const paperFonts: PaperFonts = new Map(FONT_FILES.map(file => [file, new Uint8Array(readFileSync(resolve(folder, file)))]))
