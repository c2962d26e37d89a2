/**
 * Lower Cholesky factor L (row-major, L Lᵀ = A) of a symmetric positive definite matrix, written over `matrix`.
 * A pivot that rounding has pushed to zero or below is lifted to `floor`, so that nearly dependent columns
 * lead to a finite answer.
 */
export function choleskyFactor(matrix: Float64Array, size: number, floor: number): Float64Array {
  for (let j = 0; j < size; j++) {
    for (let i = j; i < size; i++) {
      let sum = matrix[i * size + j]!;
      for (let k = 0; k < j; k++) sum -= matrix[i * size + k]! * matrix[j * size + k]!;
      matrix[i * size + j] = i === j ? Math.sqrt(Math.max(sum, floor)) : sum / matrix[j * size + j]!;
    }
  }
  return matrix;
}

/** Solves L Lᵀ x = b for the factor of `choleskyFactor`; returns a new vector. */
export function choleskySolve(factor: Float64Array, size: number, b: Float64Array): Float64Array {
  const x = Float64Array.from(b);
  for (let i = 0; i < size; i++) {
    let sum = x[i]!;
    for (let k = 0; k < i; k++) sum -= factor[i * size + k]! * x[k]!;
    x[i] = sum / factor[i * size + i]!;
  }
  for (let i = size - 1; i >= 0; i--) {
    let sum = x[i]!;
    for (let k = i + 1; k < size; k++) sum -= factor[k * size + i]! * x[k]!;
    x[i] = sum / factor[i * size + i]!;
  }
  return x;
}
