export interface LeastSquaresFit {
  coefficients: number[]
  /** Diagonal of (XᵀX)⁻¹: the variance of each coefficient for an error variance of 1. */
  unitVariances: number[]
  residualSumOfSquares: number
  degreesOfFreedom: number
}

/** A column counts as dependent on the ones before it when less than this share of its length is left. */
const DEPENDENT_SHARE = 1e-8

type Column = ArrayLike<number>

interface Orthogonal { q: Float64Array[], r: number[][] }

/** Modified Gram–Schmidt, by columns; null when a column depends on the ones before it. Plain loops: fits are most of a review's time. */
function orthogonalise(columns: readonly Column[]): Orthogonal | null {
  const q: Float64Array[] = []
  const r: number[][] = columns.map(() => columns.map(() => 0))
  for (let j = 0; j < columns.length; j++) {
    const rest = new Float64Array(columns[j]!)
    const length = lengthOf(rest)
    for (let i = 0; i < j; i++) {
      const base = q[i]!
      const along = dot(base, rest)
      r[i]![j] = along
      for (let k = 0; k < rest.length; k++) rest[k]! -= along * base[k]!
    }
    const left = lengthOf(rest)
    if (!(left > DEPENDENT_SHARE * length)) return null
    r[j]![j] = left
    for (let k = 0; k < rest.length; k++) rest[k]! /= left
    q.push(rest)
  }
  return { q, r }
}

function dot(a: Column, b: Column): number {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!
  return sum
}

const lengthOf = (column: Column) => Math.sqrt(dot(column, column))

/** Solves R·x = b for an upper triangular R. */
function backSubstitute(r: readonly number[][], b: readonly number[]): number[] {
  const x = b.map(() => 0)
  for (let i = b.length - 1; i >= 0; i--) {
    let rest = b[i]!
    for (let j = i + 1; j < b.length; j++) rest -= r[i]![j]! * x[j]!
    x[i] = rest / r[i]![i]!
  }
  return x
}

function varianceOfCoefficients(r: readonly number[][]): number[] {
  const variances = r.map(() => 0)
  for (let k = 0; k < r.length; k++) {
    const inverseColumn = backSubstitute(r, r.map((_, i) => (i === k ? 1 : 0)))
    for (let i = 0; i <= k; i++) variances[i]! += inverseColumn[i]! ** 2
  }
  return variances
}

/** Variances alone, for readings yet to be taken; null when the columns cannot be told apart. */
export function unitVariances(columns: readonly Column[]): number[] | null {
  if (columns[0]!.length < columns.length) return null
  const basis = orthogonalise(columns)
  return basis && varianceOfCoefficients(basis.r)
}

/**
 * Ordinary least squares by an orthogonal decomposition.
 * No answer (null) with fewer rows than columns, or when the columns cannot be told apart.
 */
export function leastSquares(columns: readonly Column[], values: Column): LeastSquaresFit | null {
  if (values.length < columns.length) return null
  const basis = orthogonalise(columns)
  if (!basis) return null
  const coefficients = backSubstitute(basis.r, basis.q.map(base => dot(base, values)))
  let residualSumOfSquares = 0
  for (let row = 0; row < values.length; row++) {
    let fitted = 0
    for (let i = 0; i < columns.length; i++) fitted += coefficients[i]! * columns[i]![row]!
    residualSumOfSquares += (values[row]! - fitted) ** 2
  }
  return { coefficients, unitVariances: varianceOfCoefficients(basis.r), residualSumOfSquares, degreesOfFreedom: values.length - columns.length }
}
