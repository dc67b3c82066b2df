/**
 * Solves (G + D) x = b for a symmetric, positive definite matrix by Cholesky's root.
 * @param gram row by row, size × size; left as it is
 * @param damping added to the diagonal, one for each row: large enough and no row can be out of hand
 * @returns one solution for each right-hand side
 */
export function solveDamped(
  gram: Float64Array,
  damping: Float64Array,
  sides: readonly Float64Array[],
): Float64Array[] {
  const size = damping.length
  const root = new Float64Array(size * size)
  for (let row = 0; row < size; row += 1)
    for (let column = 0; column <= row; column += 1) {
      let sum = gram[row * size + column] ?? 0
      if (row === column) sum += damping[row] ?? 0
      for (let k = 0; k < column; k += 1) sum -= (root[row * size + k] ?? 0) * (root[column * size + k] ?? 0)
      root[row * size + column] =
        row === column ? Math.sqrt(Math.max(sum, Number.EPSILON)) : sum / (root[column * size + column] ?? 1)
    }
  return sides.map((side) => {
    const x = Float64Array.from(side)
    for (let row = 0; row < size; row += 1) {
      let sum = x[row] ?? 0
      for (let k = 0; k < row; k += 1) sum -= (root[row * size + k] ?? 0) * (x[k] ?? 0)
      x[row] = sum / (root[row * size + row] ?? 1)
    }
    for (let row = size - 1; row >= 0; row -= 1) {
      let sum = x[row] ?? 0
      for (let k = row + 1; k < size; k += 1) sum -= (root[k * size + row] ?? 0) * (x[k] ?? 0)
      x[row] = sum / (root[row * size + row] ?? 1)
    }
    return x
  })
}
