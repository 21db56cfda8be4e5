import { createHash } from 'node:crypto'
import { fileTypeFromBuffer } from 'file-type'
import sharp, { type Sharp } from 'sharp'
import { MAX_PHOTO_BYTES, type PhotoSize } from '../../shared/types/photo'
import { cameraTimeOf } from './cameraTime'
import { problem } from './problems'

// One picture at a time and no memory kept of the last: a 12-megapixel photo then peaks near 225 MB.
sharp.cache(false)
sharp.concurrency(1)

/** Ours: above what phones save by default (12 to 50 million dots), below what would fill the memory. */
export const MAX_PIXELS = 64_000_000
const LONGEST_SIDE_PX: Record<PhotoSize, number> = { thumb: 320, screen: 1280, full: 4000 }
const FORMATS: Record<string, string> = { 'image/jpeg': 'jpeg', 'image/png': 'png', 'image/webp': 'webp' }

export const PHOTO_MEDIA_TYPES: Record<PhotoSize, string> = { thumb: 'image/webp', screen: 'image/webp', full: 'image/jpeg' }

export interface PreparedPhoto {
  /** Of the bytes as they came, before anything was changed. */
  sha256: string
  /** Of the full size, upright. */
  widthPx: number
  heightPx: number
  byteLength: number
  cameraTime: string | undefined
  sizes: Record<PhotoSize, Buffer>
}

export const tooLarge = () => problem(413, 'too-large', 'A photo may be at most 20 MB. Most phones can send a smaller one.')

/** What may be a photo, by its content and never by its name. Throws a coded problem with words that help. */
async function formatOf(bytes: Buffer): Promise<string> {
  if (bytes.length === 0) throw problem(422, 'empty-file', 'This file is empty.')
  if (bytes.length > MAX_PHOTO_BYTES) throw tooLarge()
  const type = (await fileTypeFromBuffer(bytes))?.mime ?? 'unknown'
  const format = FORMATS[type]
  if (format) return format
  if (/^image\/(heic|heif|avif)/.test(type)) {
    throw problem(415, 'heic-photo', 'This photo is in the HEIC form, which we cannot read here. On an iPhone choose Settings, Camera, Formats, Most Compatible and take it again, or send a screenshot of it.')
  }
  throw problem(415, 'not-a-photo', 'This is not a JPEG, PNG or WebP picture.')
}

/** Checked by content, decoded, turned upright and encoded anew in three sizes: nothing of the file itself is kept but its hash. */
export async function preparePhoto(bytes: Buffer): Promise<PreparedPhoto> {
  const format = await formatOf(bytes)
  try {
    const metadata = await openPhoto(bytes).metadata()
    if (metadata.format !== format) throw problem(415, 'not-a-photo', 'This file is not what it says it is.')
    if (metadata.width * metadata.height > MAX_PIXELS) throw tooManyDots()
    const full = await encode(openPhoto(bytes), 'full').toBuffer({ resolveWithObject: true })
    return {
      sha256: createHash('sha256').update(bytes).digest('hex'),
      widthPx: full.info.width, heightPx: full.info.height, byteLength: full.data.length,
      cameraTime: cameraTimeOf(metadata.exif),
      sizes: {
        full: full.data,
        screen: await encode(sharp(full.data), 'screen').toBuffer(),
        thumb: await encode(sharp(full.data), 'thumb').toBuffer(),
      },
    }
  }
  catch (error) {
    if ((error as { statusCode?: number }).statusCode) throw error
    if (/pixel limit/i.test((error as Error).message)) throw tooManyDots()
    throw problem(422, 'broken-photo', 'This picture could not be read to its end. Please take or choose it again.')
  }
}

const openPhoto = (bytes: Buffer) => sharp(bytes, { limitInputPixels: MAX_PIXELS, failOn: 'error', pages: 1 })

const tooManyDots = () => problem(422, 'too-many-dots', 'This picture has more than 64 million dots. Please send a smaller one.')

/** sharp leaves all metadata behind, the location too, unless told to keep it. */
function encode(image: Sharp, size: PhotoSize): Sharp {
  const side = LONGEST_SIDE_PX[size]
  const upright = image.autoOrient().flatten({ background: '#ffffff' }).resize({ width: side, height: side, fit: 'inside', withoutEnlargement: true })
  return PHOTO_MEDIA_TYPES[size] === 'image/jpeg' ? upright.jpeg({ quality: 84 }) : upright.webp({ quality: size === 'thumb' ? 70 : 78, effort: 2 })
}

export const photoKey = (storedKey: string, size: PhotoSize) => `${storedKey}/${size}.${size === 'full' ? 'jpg' : 'webp'}`
