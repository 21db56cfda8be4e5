const EXIF_POINTER = 0x8769
const TAKEN_AT = 0x9003
const TAKEN_AT_OFFSET = 0x9011
const ASCII = 2
const MOST_ENTRIES = 500

type Endian = 'le' | 'be'

/**
 * When the camera says the picture was taken (EXIF 2.32 DateTimeOriginal and OffsetTimeOriginal):
 * '2027-03-14 14:08:00' or with '+02:00' behind it. Undefined when it says nothing readable. A claim, not a proof.
 */
export function cameraTimeOf(exif: Buffer | undefined): string | undefined {
  if (!exif) return undefined
  const tiff = exif.toString('latin1', 0, 6) === 'Exif\0\0' ? exif.subarray(6) : exif
  try {
    const endian = endianOf(tiff)
    if (!endian) return undefined
    const pointer = entriesAt(tiff, readU32(tiff, 4, endian), endian).get(EXIF_POINTER)
    if (!pointer) return undefined
    const entries = entriesAt(tiff, pointer.value, endian)
    const taken = /^(\d{4}):(\d{2}):(\d{2}) (\d{2}:\d{2}:\d{2})$/.exec(textOf(tiff, entries.get(TAKEN_AT)))
    if (!taken || Number.isNaN(Date.parse(`${taken[1]}-${taken[2]}-${taken[3]}T${taken[4]}Z`))) return undefined
    const offset = /^[+-]\d{2}:\d{2}$/.exec(textOf(tiff, entries.get(TAKEN_AT_OFFSET)))?.[0]
    return `${taken[1]}-${taken[2]}-${taken[3]} ${taken[4]}${offset ? ` ${offset}` : ''}`
  }
  catch (error) {
    // An offset that points outside the block: written by hand or cut short, so it tells nothing.
    if (error instanceof RangeError) return undefined
    throw error
  }
}

interface Entry { type: number, count: number, value: number, at: number }

function endianOf(tiff: Buffer): Endian | undefined {
  return ({ II: 'le', MM: 'be' } as const)[tiff.toString('latin1', 0, 2)]
}

const readU16 = (bytes: Buffer, at: number, endian: Endian) => endian === 'le' ? bytes.readUInt16LE(at) : bytes.readUInt16BE(at)
const readU32 = (bytes: Buffer, at: number, endian: Endian) => endian === 'le' ? bytes.readUInt32LE(at) : bytes.readUInt32BE(at)

function entriesAt(tiff: Buffer, start: number, endian: Endian): Map<number, Entry> {
  const count = Math.min(readU16(tiff, start, endian), MOST_ENTRIES)
  const entries = new Map<number, Entry>()
  for (let i = 0; i < count; i++) {
    const at = start + 2 + i * 12
    entries.set(readU16(tiff, at, endian), {
      type: readU16(tiff, at + 2, endian), count: readU32(tiff, at + 4, endian), value: readU32(tiff, at + 8, endian), at: at + 8,
    })
  }
  return entries
}

function textOf(tiff: Buffer, entry: Entry | undefined): string {
  if (!entry || entry.type !== ASCII || entry.count > 64) return ''
  const from = entry.count <= 4 ? entry.at : entry.value
  return tiff.toString('latin1', from, from + entry.count).replace(/\0.*$/s, '').trim()
}
