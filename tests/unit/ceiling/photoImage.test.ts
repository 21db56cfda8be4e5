import { createHash } from 'node:crypto'
import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { preparePhoto } from '../../../server/utils/photoImage'
import { pngBomb } from '../../support/pngBomb'

/** A crack-like drawing of our own: left half dark, right half light, so that a turn shows. */
async function picture(widthPx = 800, heightPx = 600) {
  const left = await sharp({ create: { width: widthPx / 2, height: heightPx, channels: 3, background: '#202020' } }).png().toBuffer()
  return sharp({ create: { width: widthPx, height: heightPx, channels: 3, background: '#e0e0e0' } }).composite([{ input: left, left: 0, top: 0 }])
}

/** EXIF written by libexif through sharp, so that our reader is held against another's writer. */
async function phonePhoto(orientation = 1) {
  const image = await picture()
  return image.withExif({
    IFD0: { Make: 'Invented', Model: 'Phone' },
    IFD2: { DateTimeOriginal: '2027:03:14 14:08:09', OffsetTimeOriginal: '+02:00' },
    IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 3230/100', GPSLongitudeRef: 'W', GPSLongitude: '0/1 7/1 4366/100' },
  }).withMetadata({ orientation }).jpeg().toBuffer()
}

const refusal = (bytes: Buffer) => preparePhoto(bytes).then(() => undefined, (error: { statusCode: number, data: { code: string }, message: string }) => ({ status: error.statusCode, code: error.data.code, message: error.message }))

describe('preparePhoto', () => {
  it('keeps the hash of the original and makes three sizes that keep the proportions', async () => {
    const original = await (await picture(5000, 3000)).jpeg().toBuffer()
    const photo = await preparePhoto(original)
    expect(photo.sha256).toBe(createHash('sha256').update(original).digest('hex'))
    const sizes = await Promise.all((['thumb', 'screen', 'full'] as const).map(size => sharp(photo.sizes[size]).metadata()))
    expect(sizes.map(({ format, width, height }) => [format, width, height])).toEqual([['webp', 320, 192], ['webp', 1280, 768], ['jpeg', 4000, 2400]])
    expect([photo.widthPx, photo.heightPx, photo.byteLength]).toEqual([4000, 2400, photo.sizes.full.length])
  })

  it('never enlarges a small picture', async () => {
    const photo = await preparePhoto(await (await picture(200, 100)).png().toBuffer())
    expect((await sharp(photo.sizes.screen).metadata()).width).toBe(200)
  })

  it('turns the picture upright by its EXIF orientation', async () => {
    const photo = await preparePhoto(await phonePhoto(6))
    expect([photo.widthPx, photo.heightPx]).toEqual([600, 800])
    // Orientation 6: the stored left edge is the upright top (EXIF 2.32, Orientation), so the dark half is on top.
    const { data, info } = await sharp(photo.sizes.full).greyscale().raw().toBuffer({ resolveWithObject: true })
    expect(data[info.width * 10 + 300]).toBeLessThan(80)
    expect(data[info.width * 790 + 300]).toBeGreaterThan(180)
  })

  it('removes the location and every other metadata, and keeps the camera time as data', async () => {
    const original = await phonePhoto()
    expect((await sharp(original).metadata()).exif?.toString('latin1')).toContain('Invented')
    const photo = await preparePhoto(original)
    expect(photo.cameraTime).toBe('2027-03-14 14:08:09 +02:00')
    for (const bytes of Object.values(photo.sizes)) {
      const { exif, xmp, iptc, orientation } = await sharp(bytes).metadata()
      expect({ exif, xmp, iptc, orientation }).toEqual({ exif: undefined, xmp: undefined, iptc: undefined, orientation: undefined })
      expect(bytes.includes('Exif') || bytes.includes('Invented')).toBe(false)
    }
  })

  it('takes PNG with see-through parts and WebP', async () => {
    const clear = await sharp({ create: { width: 50, height: 50, channels: 4, background: { r: 0, g: 0, b: 0, alpha: 0 } } }).png().toBuffer()
    const photo = await preparePhoto(clear)
    expect((await sharp(photo.sizes.full).raw().toBuffer())[0]).toBeGreaterThan(250)
    expect((await preparePhoto(await (await picture()).webp().toBuffer())).widthPx).toBe(800)
  })

  it('carries nothing over that was hidden behind a picture', async () => {
    const payload = '<script>alert(1)</script>PK\u0003\u0004'
    const polyglot = Buffer.concat([await phonePhoto(), Buffer.from(payload, 'latin1')])
    const photo = await preparePhoto(polyglot)
    for (const bytes of Object.values(photo.sizes)) expect(bytes.includes('<script>')).toBe(false)
  })

  it('refuses what is not a picture, with words that help', async () => {
    const svg = Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>')
    const heic = Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic', 'latin1'), Buffer.alloc(64)])
    const gif = await (await picture()).gif().toBuffer()
    for (const bytes of [svg, gif, Buffer.from('%PDF-1.7\n'), Buffer.from('GIF89a'), Buffer.from('hello')]) {
      expect(await refusal(bytes)).toMatchObject({ status: 415, code: 'not-a-photo' })
    }
    expect(await refusal(heic)).toMatchObject({ status: 415, code: 'heic-photo', message: expect.stringContaining('Most Compatible') })
    expect(await refusal(Buffer.alloc(0))).toMatchObject({ status: 422, code: 'empty-file' })
  })

  it('refuses a picture that ends too early', async () => {
    for (const whole of [await phonePhoto(), await (await picture()).png({ compressionLevel: 0 }).toBuffer(), await (await picture()).webp({ lossless: true }).toBuffer()]) {
      expect(await refusal(whole.subarray(0, Math.floor(whole.length * 0.6)))).toMatchObject({ status: 422, code: 'broken-photo' })
    }
  })

  it('refuses a picture of 900 million dots that takes only kilobytes to send', async () => {
    expect(await refusal(pngBomb(30_000, 30_000))).toMatchObject({ status: 422, code: 'too-many-dots' })
  })

  it('refuses more than 20 MB', async () => {
    expect(await refusal(Buffer.alloc(20_000_001, 0xFF))).toMatchObject({ status: 413, code: 'too-large' })
  })
})
