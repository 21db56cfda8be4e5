import { describe, expect, it } from 'vitest'
import { isPasswordOf, isPasswordOfNobody, makePasswordHash } from '../../../server/utils/passwords'

const base64 = (bytes: Buffer) => bytes.toString('base64').replace(/=+$/, '')

/** RFC 7914 "The scrypt Password-Based Key Derivation Function", section 12, third test vector: N = 16384, r = 8, p = 1, 64 bytes. */
const RFC_7914 = {
  password: 'pleaseletmein',
  salt: 'SodiumChloride',
  key: '7023bdcb3afd7348461c06cd81fd38ebfda8fbba904f8e3ea9b543f6545da1f2d5432955613f0fcf62d49705242a9af9e61e85dc0d651e40dfcf017b45575887',
}

describe('password hashes', () => {
  it('are scrypt as RFC 7914 computes it', async () => {
    const hash = `$scrypt$n=16384,r=8,p=1$${base64(Buffer.from(RFC_7914.salt))}$${base64(Buffer.from(RFC_7914.key, 'hex'))}`
    expect(await isPasswordOf(hash, RFC_7914.password)).toBe(true)
    expect(await isPasswordOf(hash, `${RFC_7914.password}!`)).toBe(false)
  })

  it('carry the parameters nuxt-auth-utils uses by default, and a salt of their own', async () => {
    const [first, second] = await Promise.all([makePasswordHash('three wet stones'), makePasswordHash('three wet stones')])
    expect(first).toMatch(/^\$scrypt\$n=16384,r=8,p=1\$/)
    expect(first).not.toBe(second)
    expect(await isPasswordOf(second, 'three wet stones')).toBe(true)
  })

  it('take a letter written in either of its two Unicode forms as the same (NIST SP 800-63B, normalisation)', async () => {
    const composed = 'caf\u00E9 rafters'
    const decomposed = 'cafe\u0301 rafters'
    expect(await isPasswordOf(await makePasswordHash(composed), decomposed)).toBe(true)
  })

  it('are never matched by nobody\'s, nor by a spoilt hash', async () => {
    expect(await isPasswordOfNobody('an account that does not exist')).toBe(false)
    expect(await isPasswordOf('not a hash', 'anything')).toBe(false)
  })
})
