import { Z_975 } from './normal'

/** Student's t, 0.975 quantile, for 1 to 30 degrees of freedom (NIST/SEMATECH e-Handbook, table 1.3.6.7.2). */
const T_975 = [
  12.706, 4.303, 3.182, 2.776, 2.571, 2.447, 2.365, 2.306, 2.262, 2.228,
  2.201, 2.179, 2.160, 2.145, 2.131, 2.120, 2.110, 2.101, 2.093, 2.086,
  2.080, 2.074, 2.069, 2.064, 2.060, 2.056, 2.052, 2.048, 2.045, 2.042,
] as const

/** Beyond the table: the first terms of the Cornish–Fisher expansion, right to three decimals there. */
export function tQuantile975(degreesOfFreedom: number): number {
  const tabled = T_975[degreesOfFreedom - 1]
  if (tabled !== undefined) return tabled
  const z = Z_975
  const v = degreesOfFreedom
  return z + (z ** 3 + z) / (4 * v) + (5 * z ** 5 + 16 * z ** 3 + 3 * z) / (96 * v ** 2)
}
