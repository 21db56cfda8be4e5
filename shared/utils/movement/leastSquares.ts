export interface LeastSquaresFit {
  coefficients: number[]
  /** Diagonal of (XᵀX)⁻¹: the variance of each coefficient for an error variance of 1. */
  unitVariances: number[]
  residualSumOfSquares: number
  degreesOfFreedom: number
}

/** A column counts as dependent on the ones before it when less than this share of its length is left. */
const DEPENDENT_SHARE = 1e-8

interface Orthogonal { q: number[][], r: number[][] }

/** Modified Gram–Schmidt, by columns; null when a column depends on the ones before it. */
function orthogonalise(columns: number[][]): Orthogonal | null {
  const q: number[][] = []
  const r: number[][] = columns.map(() => columns.map(() => 0))
  for (const [j, column] of columns.entries()) {
    const length = Math.hypot(...column)
    let rest = [...column]
    for (const [i, base] of q.entries()) {
      const along = dot(base, rest)
      r[i]![j] = along
      rest = rest.map((value, k) => value - along * base[k]!)
    }
    const left = Math.hypot(...rest)
    if (!(left > DEPENDENT_SHARE * length)) return null
    r[j]![j] = left
    q.push(rest.map(value => value / left))
  }
  return { q, r }
}

function dot(a: number[], b: number[]): number {
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0)
}

/** Solves R·x = b for an upper triangular R. */
function backSubstitute(r: number[][], b: number[]): number[] {
  const x = b.map(() => 0)
  for (let i = b.length - 1; i >= 0; i--) {
    let rest = b[i]!
    for (let j = i + 1; j < b.length; j++) rest -= r[i]![j]! * x[j]!
    x[i] = rest / r[i]![i]!
  }
  return x
}

/**
 * Ordinary least squares by an orthogonal decomposition.
 * No answer (null) with fewer rows than columns, or when the columns cannot be told apart.
 */
export function leastSquares(columns: number[][], values: number[]): LeastSquaresFit | null {
  if (values.length < columns.length) return null
  const basis = orthogonalise(columns)
  if (!basis) return null
  const coefficients = backSubstitute(basis.r, basis.q.map(base => dot(base, values)))
  const inverseColumns = columns.map((_, i) => backSubstitute(basis.r, columns.map((_, k) => (k === i ? 1 : 0))))
  const unitVariances = columns.map((_, i) => inverseColumns.reduce((sum, column) => sum + column[i]! ** 2, 0))
  const residualSumOfSquares = values.reduce((sum, value, row) => {
    const fitted = coefficients.reduce((total, c, i) => total + c * columns[i]![row]!, 0)
    return sum + (value - fitted) ** 2
  }, 0)
  return { coefficients, unitVariances, residualSumOfSquares, degreesOfFreedom: values.length - columns.length }
}
