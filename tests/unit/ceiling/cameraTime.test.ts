import { describe, expect, it } from 'vitest'
import { cameraTimeOf } from '../../../server/utils/cameraTime'

/** One EXIF block with a single text tag in its EXIF directory, in either byte order (TIFF 6.0 section 2). */
function exif(text: string, { order = 'MM', pointer = 26, tag = 0x9003 } = {}) {
  const bytes = Buffer.alloc(44 + text.length + 1)
  const u16 = (value: number, at: number) => order === 'MM' ? bytes.writeUInt16BE(value, at) : bytes.writeUInt16LE(value, at)
  const u32 = (value: number, at: number) => order === 'MM' ? bytes.writeUInt32BE(value, at) : bytes.writeUInt32LE(value, at)
  bytes.write(order, 0, 'latin1')
  u16(42, 2)
  u32(8, 4)
  const entry = (at: number, number: number, type: number, count: number, value: number) => {
    u16(1, at)
    u16(number, at + 2)
    u16(type, at + 4)
    u32(count, at + 6)
    u32(value, at + 10)
  }
  entry(8, 0x8769, 4, 1, pointer)
  entry(26, tag, 2, text.length + 1, 44)
  bytes.write(text, 44, 'latin1')
  return bytes
}

describe('cameraTimeOf', () => {
  it('reads both byte orders, with or without the Exif prefix', () => {
    for (const order of ['MM', 'II']) {
      expect(cameraTimeOf(exif('2027:03:14 14:08:09', { order }))).toBe('2027-03-14 14:08:09')
      expect(cameraTimeOf(Buffer.concat([Buffer.from('Exif\0\0', 'latin1'), exif('2027:03:14 14:08:09', { order })]))).toBe('2027-03-14 14:08:09')
    }
  })

  it('has no answer when the block is missing, cut short, points outside itself, or holds no time', () => {
    for (const block of [
      undefined, Buffer.alloc(0), Buffer.from('nonsense'), exif('2027:03:14 14:08:09').subarray(0, 30),
      exif('2027:03:14 14:08:09', { pointer: 0xFFFFFFF0 }), exif('0000:00:00 00:00:00'), exif('2027:13:41 14:08:09'), exif('yesterday'), exif('2027:03:14 14:08:09', { tag: 0x9004 }),
    ]) expect(cameraTimeOf(block)).toBeUndefined()
  })
})
