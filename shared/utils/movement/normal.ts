import { errorFunction } from 'simple-statistics'

/** Standard normal quantiles (any table of the normal distribution). */
export const Z_80 = 0.8416212335729143
export const Z_95 = 1.6448536269514722
export const Z_975 = 1.959963984540054
export const Z_99 = 2.3263478740408408

/** Chance that a standard normal value is below z. Error below 2e-7 (the error function of simple-statistics). */
export function normalBelow(z: number): number {
  return Math.min(1, Math.max(0, 0.5 * (1 + errorFunction(z / Math.SQRT2))))
}
