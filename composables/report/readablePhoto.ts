import { MAX_PHOTO_BYTES } from '~/shared/types/photo'

/** Ours: what the server keeps as the full size. */
const LONGEST_SIDE_PX = 4000
const JPEG_QUALITY = 0.88
const TAKEN_AS_THEY_ARE = ['jpeg', 'png', 'webp']

export type ReadablePhoto = { kind: 'photo', picture: Blob } | { kind: 'refused', why: string }

const HEIC = 'This photo is in the HEIC form, which this browser cannot read. On an iPhone choose Settings, Camera, Formats, Most Compatible and take it again, or send a screenshot of it.'
const NOT_A_PHOTO = 'This is not a photo we can read. JPEG, PNG and WebP pictures work.'
const TOO_LARGE = 'A photo may be at most 20 MB, and this one could not be made smaller here. Most phones can take a smaller one.'

/** What a file is, by its first bytes and never by its name. */
export function formOfPhoto(head: Uint8Array): 'jpeg' | 'png' | 'webp' | 'heic' | 'unknown' {
  const text = (from: number, to: number) => String.fromCharCode(...head.slice(from, to))
  if (head[0] === 0xFF && head[1] === 0xD8) return 'jpeg'
  if (text(1, 4) === 'PNG') return 'png'
  if (text(0, 4) === 'RIFF' && text(8, 12) === 'WEBP') return 'webp'
  if (text(4, 8) === 'ftyp' && /^(hei|hev|mif|msf|avi)/.test(text(8, 12))) return 'heic'
  return 'unknown'
}

/** JPEG, PNG and WebP as they are; HEIC and what is too large as a JPEG, where this browser can decode them. */
export async function readablePhoto(file: Blob): Promise<ReadablePhoto> {
  const form = formOfPhoto(new Uint8Array(await file.slice(0, 16).arrayBuffer()))
  if (TAKEN_AS_THEY_ARE.includes(form) && file.size <= MAX_PHOTO_BYTES) return { kind: 'photo', picture: file }
  const picture = await asJpeg(file)
  if (picture && picture.size <= MAX_PHOTO_BYTES) return { kind: 'photo', picture }
  return { kind: 'refused', why: form === 'heic' ? HEIC : form === 'unknown' ? NOT_A_PHOTO : TOO_LARGE }
}

async function asJpeg(file: Blob): Promise<Blob | null> {
  try {
    const bitmap = await createImageBitmap(file)
    const scale = Math.min(1, LONGEST_SIDE_PX / Math.max(bitmap.width, bitmap.height))
    const canvas = document.createElement('canvas')
    canvas.width = Math.round(bitmap.width * scale)
    canvas.height = Math.round(bitmap.height * scale)
    canvas.getContext('2d')?.drawImage(bitmap, 0, 0, canvas.width, canvas.height)
    bitmap.close()
    return await new Promise(resolve => canvas.toBlob(resolve, 'image/jpeg', JPEG_QUALITY))
  }
  catch { return null }
}
