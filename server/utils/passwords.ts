import { Hash } from '@adonisjs/hash'
import { Scrypt } from '@adonisjs/hash/drivers/scrypt'

/**
 * The scrypt that nuxt-auth-utils uses, with the same parameters (N = 16384, r = 8, p = 1), but free of Nitro,
 * so that the demo seed and tests make hashes a sign-in accepts. NFKC first (NIST SP 800-63B §3.1.1.2): two keyboards may
 * write the same letter in two ways.
 */
const scrypt = new Hash(new Scrypt({}))

export const makePasswordHash = (password: string) => scrypt.make(password.normalize('NFKC'))

export const isPasswordOf = (hash: string, password: string) => scrypt.verify(hash, password.normalize('NFKC'))

let nobodysHash: Promise<string> | undefined

/** Costs what a real check costs and is never true: for addresses that no account has. */
export async function isPasswordOfNobody(password: string): Promise<false> {
  await isPasswordOf(await (nobodysHash ??= makePasswordHash('an account that does not exist')), password)
  return false
}
