/**
 * The value that would stand at `index` (from 0) if the first `length` values were sorted; reorders them (Hoare's selection).
 * A sort of all pairwise slopes costs several times as much.
 */
export function selectRank(values: Float64Array, length: number, index: number): number {
  let left = 0
  let right = length - 1
  while (left < right) {
    const pivot = middleOfThree(values[left]!, values[(left + right) >> 1]!, values[right]!)
    let i = left
    let j = right
    while (i <= j) {
      while (values[i]! < pivot) i++
      while (values[j]! > pivot) j--
      if (i <= j) {
        const kept = values[i]!
        values[i++] = values[j]!
        values[j--] = kept
      }
    }
    if (index <= j) right = j
    else if (index >= i) left = i
    else break
  }
  return values[index]!
}

function middleOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c))
}

/** Median of the first `length` values; reorders them. */
export function selectMedian(values: Float64Array, length: number): number {
  const upper = selectRank(values, length, length >> 1)
  if (length % 2 === 1) return upper
  let lower = values[0]!
  for (let i = 1; i < length >> 1; i++) lower = Math.max(lower, values[i]!)
  return (lower + upper) / 2
}
