import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { FIRST_HASH, hashEntry, sortedJson, type HashedEntry } from '../../../server/utils/recordHash'

const entry: HashedEntry = {
  chainId: '01a22ffc-2663-71fd-9964-97c5f8cd8759', seq: 1, recordedAt: '2026-12-01T05:03:14.765Z', actorId: null, actorName: 'Oona', action: 'unit added',
  subjectKind: 'unit', subjectId: '01a22ffc-2663-71fd-9964-97c5f8cd8759', before: null, after: { name: 'Upper flat', b: 1, a: [2, { d: 3, c: 4 }] }, previousHash: FIRST_HASH,
}

describe('sortedJson', () => {
  it('writes keys in one order at every depth, and lists in their own', () => {
    expect(sortedJson({ b: 1, a: { d: [3, { z: 1, y: 2 }], c: null } })).toBe('{"a":{"c":null,"d":[3,{"y":2,"z":1}]},"b":1}')
  })

  it('leaves out what is undefined, as JSON does', () => {
    expect(sortedJson({ b: undefined, a: 1 })).toBe('{"a":1}')
  })

  it('is JSON of the same value, whatever the value', () => {
    fc.assert(fc.property(fc.jsonValue(), (value) => {
      expect(JSON.parse(sortedJson(value))).toEqual(JSON.parse(JSON.stringify(value)))
    }))
  })

  it('does not depend on the order in which keys were written', () => {
    fc.assert(fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (value) => {
      expect(sortedJson(Object.fromEntries(Object.entries(value).reverse()))).toBe(sortedJson(value))
    }))
  })
})

describe('hashEntry', () => {
  it('is SHA-256 (FIPS 180-4) over the sorted JSON of the named fields, written out here', () => {
    const written = '{"action":"unit added","actorId":null,"actorName":"Oona","after":{"a":[2,{"c":4,"d":3}],"b":1,"name":"Upper flat"},"before":null,'
      + '"chainId":"01a22ffc-2663-71fd-9964-97c5f8cd8759","previousHash":"0000000000000000000000000000000000000000000000000000000000000000",'
      + '"recordedAt":"2026-12-01T05:03:14.765Z","seq":1,"subjectId":"01a22ffc-2663-71fd-9964-97c5f8cd8759","subjectKind":"unit"}'
    expect(hashEntry(entry)).toBe(createHash('sha256').update(written).digest('hex'))
  })

  it.each(Object.keys(entry) as (keyof HashedEntry)[])('changes with %s', (key) => {
    const other = { ...entry, [key]: typeof entry[key] === 'number' ? 2 : key === 'before' || key === 'after' ? { other: true } : 'other' }
    expect(hashEntry(other)).not.toBe(hashEntry(entry))
  })

  it('takes no notice of columns that are not part of the chain', () => {
    expect(hashEntry({ ...entry, id: 'x', organisationId: 'y' } as HashedEntry)).toBe(hashEntry(entry))
  })
})
