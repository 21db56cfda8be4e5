/** Thrown only where a stable signature leaves no room for a refusal as a value. `at` names the input. */
export class StructureRefused extends Error {
  readonly code: string
  readonly at: string

  constructor(code: string, at: string) {
    super(`${code} at ${at}`)
    this.name = 'StructureRefused'
    this.code = code
    this.at = at
  }
}

export function requirePositive(value: number, at: string): void {
  if (!Number.isFinite(value) || value <= 0) throw new StructureRefused('not-a-positive-number', at)
}

export function requireNotNegative(value: number, at: string): void {
  if (!Number.isFinite(value) || value < 0) throw new StructureRefused('negative-or-not-a-number', at)
}
