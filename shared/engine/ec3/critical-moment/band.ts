/**
 * L D Lᵀ of a symmetric band matrix (4 numbers a row, A[i][i] … A[i][i + 3]), in place: row i keeps
 * D[i] and the three multipliers below it. Returns the number of negative pivots (Sylvester's inertia).
 */
export function factorBand(a: Float64Array, n: number): number {
  let negative = 0
  for (let i = 0; i < n; i++) {
    const r = 4 * i
    let d = a[r]!
    if (d === 0) d = 1e-300
    if (d < 0) negative++
    a[r] = d
    const u1 = a[r + 1]!
    const u2 = a[r + 2]!
    const u3 = a[r + 3]!
    const l1 = u1 / d
    const l2 = u2 / d
    const l3 = u3 / d
    if (i + 1 < n) {
      a[r + 4] = a[r + 4]! - l1 * u1
      a[r + 5] = a[r + 5]! - l1 * u2
      a[r + 6] = a[r + 6]! - l1 * u3
    }
    if (i + 2 < n) {
      a[r + 8] = a[r + 8]! - l2 * u2
      a[r + 9] = a[r + 9]! - l2 * u3
    }
    if (i + 3 < n) a[r + 12] = a[r + 12]! - l3 * u3
    a[r + 1] = l1
    a[r + 2] = l2
    a[r + 3] = l3
  }
  return negative
}

/** Solves with the factors of `factorBand`, in place, on `x[offset] … x[offset + n − 1]`. */
export function solveBand(a: Float64Array, n: number, x: Float64Array, offset = 0): void {
  for (let i = 0; i < n; i++) {
    const r = 4 * i
    const value = x[offset + i]!
    if (i + 1 < n) x[offset + i + 1] = x[offset + i + 1]! - a[r + 1]! * value
    if (i + 2 < n) x[offset + i + 2] = x[offset + i + 2]! - a[r + 2]! * value
    if (i + 3 < n) x[offset + i + 3] = x[offset + i + 3]! - a[r + 3]! * value
  }
  for (let i = n - 1; i >= 0; i--) {
    const r = 4 * i
    let value = x[offset + i]! / a[r]!
    if (i + 1 < n) value -= a[r + 1]! * x[offset + i + 1]!
    if (i + 2 < n) value -= a[r + 2]! * x[offset + i + 2]!
    if (i + 3 < n) value -= a[r + 3]! * x[offset + i + 3]!
    x[offset + i] = value
  }
}

/** xᵀ A x of a symmetric band matrix. */
export function quadraticForm(a: Float64Array, n: number, x: Float64Array): number {
  let sum = 0
  for (let i = 0; i < n; i++) {
    const r = 4 * i
    let row = 0.5 * a[r]! * x[i]!
    if (i + 1 < n) row += a[r + 1]! * x[i + 1]!
    if (i + 2 < n) row += a[r + 2]! * x[i + 2]!
    if (i + 3 < n) row += a[r + 3]! * x[i + 3]!
    sum += 2 * row * x[i]!
  }
  return sum
}

/** y = A x of a symmetric band matrix. */
export function multiplyBand(a: Float64Array, n: number, x: Float64Array, y: Float64Array): void {
  y.fill(0, 0, n)
  for (let i = 0; i < n; i++) {
    const r = 4 * i
    y[i] = y[i]! + a[r]! * x[i]!
    for (let d = 1; d < 4 && i + d < n; d++) {
      y[i] = y[i]! + a[r + d]! * x[i + d]!
      y[i + d] = y[i + d]! + a[r + d]! * x[i]!
    }
  }
}
