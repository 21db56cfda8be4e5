import { describe, expect, it } from 'vitest'
import { formOfPhoto, readablePhoto } from '../../../composables/report/readablePhoto'
import { MAX_PHOTO_BYTES } from '../../../shared/types/photo'
import { drawnPhoto } from '../../support/ceilingHome'
import sharp from 'sharp'

const bytes = (...parts: (string | number)[]) => Uint8Array.from(parts.flatMap(part => typeof part === 'string' ? [...part].map(letter => letter.charCodeAt(0)) : [part]))

describe('a file from a phone', () => {
  it('is told by its first bytes', async () => {
    expect(formOfPhoto(await drawnPhoto())).toBe('jpeg')
    const picture = sharp({ create: { width: 2, height: 2, channels: 3, background: '#fff' } })
    expect(formOfPhoto(await picture.clone().png().toBuffer())).toBe('png')
    expect(formOfPhoto(await picture.clone().webp().toBuffer())).toBe('webp')
    for (const brand of ['heic', 'heix', 'mif1', 'msf1', 'hevc']) expect(formOfPhoto(bytes(0, 0, 0, 24, 'ftyp', brand, 0, 0))).toBe('heic')
    expect(formOfPhoto(bytes('%PDF-1.7'))).toBe('unknown')
    expect(formOfPhoto(bytes())).toBe('unknown')
  })

  it('goes as it is when every reader knows the form', async () => {
    const file = new Blob([new Uint8Array(await drawnPhoto())], { type: 'image/x-nonsense' })
    expect(await readablePhoto(file)).toEqual({ kind: 'photo', picture: file })
  })

  it('is refused with words that help where this browser cannot decode it', async () => {
    const heic = await readablePhoto(new Blob([bytes(0, 0, 0, 24, 'ftypheic', 0, 0)]))
    expect(heic).toMatchObject({ kind: 'refused', why: expect.stringContaining('Most Compatible') as string })
    expect(await readablePhoto(new Blob([bytes('%PDF-1.7')]))).toMatchObject({ kind: 'refused', why: expect.stringContaining('JPEG') as string })
    const huge = new Blob([bytes(0xFF, 0xD8), new Uint8Array(MAX_PHOTO_BYTES)])
    expect(await readablePhoto(huge)).toMatchObject({ kind: 'refused', why: expect.stringContaining('20 MB') as string })
  })
})
