import { FONT_FILES, type PaperFonts } from './paperFonts'

let kept: Promise<PaperFonts> | undefined

/** The fonts inside the built program, read once. */
export function shippedFonts(): Promise<PaperFonts> {
  kept ??= readAll()
  return kept
}

async function readAll(): Promise<PaperFonts> {
  const storage = useStorage('assets:fonts')
  const files = await Promise.all(FONT_FILES.map(async (file) => {
    const bytes = await storage.getItemRaw<Uint8Array>(file)
    if (!bytes) throw new Error(`The font ${file} is not in the build.`)
    return [file, new Uint8Array(bytes)] as const
  }))
  return new Map(files)
}
