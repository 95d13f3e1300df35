import { factorBand, multiplyBand, quadraticForm, solveBand } from './band'
import type { BucklingMesh } from './mesh'

/**
 * The moment diagram and the loads with a height, by station interval: M and V at the start of each
 * interval (Nmm, N), q its line load (N/mm); qTop and PTop are what acts at zg (N/mm, N by station).
 */
export interface BucklingLoads {
  M: ArrayLike<number>
  V: ArrayLike<number>
  q: ArrayLike<number>
  qTop: ArrayLike<number>
  PTop: ArrayLike<number>
}

/** Room for one solution; grows as needed and is used again. No state survives a call. */
const room = { size: 0, columns: 0, K: new Float64Array(0), Q: new Float64Array(0), Z: new Float64Array(0), T: new Float64Array(0), D: new Float64Array(0), theta: new Float64Array(0), y: new Float64Array(0), U: new Float64Array(0), W: new Float64Array(0), S: new Float64Array(0), z: new Float64Array(0) }

function makeRoom(n: number, m: number): void {
  if (n > room.size) {
    room.size = n
    for (const key of ['K', 'Q', 'Z', 'T', 'D'] as const) room[key] = new Float64Array(4 * n + 16)
    for (const key of ['theta', 'y'] as const) room[key] = new Float64Array(n)
    room.columns = 0
  }
  if (m > room.columns) {
    room.columns = m
    room.U = new Float64Array(room.size * m)
    room.W = new Float64Array(room.size * m)
    room.S = new Float64Array(m * m)
    room.z = new Float64Array(m)
  }
}

/** K = G It ∫θ'² + E Iw ∫θ''², with 1 on the diagonal of fixed unknowns. */
function stiffness(mesh: BucklingMesh, GIt: number, EIw: number): void {
  const { K } = room
  const one = GIt / mesh.length
  const two = EIw / mesh.length ** 3
  for (let i = 0; i < 4 * mesh.unknowns; i++) K[i] = one * mesh.bend1[i]! + two * mesh.bend2[i]!
  fix(mesh, K, K[4]!)
}

/** Clears rows and columns of fixed unknowns; `diagonal` keeps the matrix regular. */
function fix(mesh: BucklingMesh, a: Float64Array, diagonal: number): void {
  for (let i = 0; i < mesh.unknowns; i++) {
    if (mesh.fixed[i] !== 1) continue
    a[4 * i] = diagonal
    for (let d = 1; d < 4; d++) {
      a[4 * i + d] = 0
      if (i - d >= 0) a[4 * (i - d) + d] = 0
    }
  }
}

function addShape(a: Float64Array, first: number, shape: Float64Array, at: number, c: number): void {
  const s0 = shape[at]!
  const s1 = shape[at + 1]!
  const s2 = shape[at + 2]!
  const s3 = shape[at + 3]!
  const r = 4 * first
  const c0 = c * s0
  const c1 = c * s1
  const c2 = c * s2
  a[r] = a[r]! + c0 * s0
  a[r + 1] = a[r + 1]! + c0 * s1
  a[r + 2] = a[r + 2]! + c0 * s2
  a[r + 3] = a[r + 3]! + c0 * s3
  a[r + 4] = a[r + 4]! + c1 * s1
  a[r + 5] = a[r + 5]! + c1 * s2
  a[r + 6] = a[r + 6]! + c1 * s3
  a[r + 8] = a[r + 8]! + c2 * s2
  a[r + 9] = a[r + 9]! + c2 * s3
  a[r + 12] = a[r + 12]! + c * s3 * s3
}

/** Q = ∫ M² θ²/(E Iz), Z = ∫ q zg θ² + Σ P zg θ², and the columns U that lateral reactions give back. */
function geometry(mesh: BucklingMesh, loads: BucklingLoads, zg: number, EIz: number, scale: number): boolean {
  const n = mesh.unknowns
  const { Q, Z, U } = room
  Q.fill(0, 0, 4 * n)
  Z.fill(0, 0, 4 * n)
  const m = mesh.restraints
  U.fill(0, 0, n * m)
  let raised = false
  const root = Math.sqrt(EIz)
  for (let p = 0; p < mesh.points; p++) {
    const i = mesh.start + mesh.interval[p]!
    const s = mesh.length * mesh.offset[p]!
    const w = mesh.length * mesh.weight[p]!
    const M = scale * (loads.M[i]! + s * (loads.V[i]! - 0.5 * s * loads.q[i]!))
    const first = mesh.first[p]!
    addShape(Q, first, mesh.shape, 4 * p, w * M * M / EIz)
    const high = scale * loads.qTop[i]! * zg
    if (high !== 0) {
      raised = true
      addShape(Z, first, mesh.shape, 4 * p, w * high)
    }
    for (let j = 0; j < m; j++) {
      const c = w * M * mesh.hats[j * mesh.points + p]! / root
      if (c === 0) continue
      for (let a = 0; a < 4; a++) U[j * n + first + a] = U[j * n + first + a]! + c * mesh.shape[4 * p + a]!
    }
  }
  for (let k = 0; k < mesh.stations; k++) {
    const high = scale * loads.PTop[mesh.start + mesh.stationIndex[k]!]! * zg
    if (high === 0) continue
    raised = true
    addShape(Z, mesh.stationFirst[k]!, mesh.stationShape, 4 * k, high)
  }
  fix(mesh, Q, 0)
  if (raised) fix(mesh, Z, 0)
  if (m > 0) orthonormalise(mesh)
  return raised
}

/** U ← B L⁻ᵀ, so that U Uᵀ = B A⁻¹ Bᵀ with A = ∫ m_i m_j; fixed unknowns cleared. */
function orthonormalise(mesh: BucklingMesh): void {
  const { unknowns: n, restraints: m, hatFactor: L } = mesh
  const { U } = room
  const root = Math.sqrt(mesh.length)
  for (let j = 0; j < m; j++) {
    for (let i = 0; i < n; i++) {
      let value = mesh.fixed[i] === 1 ? 0 : U[j * n + i]!
      value /= root
      if (j > 0) value -= L[j * m + j - 1]! * U[(j - 1) * n + i]!
      U[j * n + i] = value / L[j * m + j]!
    }
  }
}

/** T(λ) = K − λ Z − λ² (Q − U Uᵀ), factored; returns the number of its negative eigenvalues. */
function factorAt(mesh: BucklingMesh, lambda: number, raised: boolean): number {
  const n = mesh.unknowns
  const m = mesh.restraints
  const { K, Q, Z, T, U, W, S } = room
  const l2 = lambda * lambda
  for (let i = 0; i < 4 * n; i++) T[i] = K[i]! - l2 * Q[i]! - (raised ? lambda * Z[i]! : 0)
  let negative = factorBand(T, n)
  if (m === 0) return negative
  for (let j = 0; j < m; j++) {
    for (let i = 0; i < n; i++) W[j * n + i] = U[j * n + i]!
    solveBand(T, n, W, j * n)
  }
  for (let j = 0; j < m; j++) {
    for (let k = 0; k <= j; k++) {
      let dot = 0
      for (let i = 0; i < n; i++) dot += U[k * n + i]! * W[j * n + i]!
      S[j * m + k] = -l2 * dot - (j === k ? 1 : 0)
    }
  }
  negative += factorDense(S, m) - m
  return negative
}

/** L D Lᵀ of a small symmetric matrix (lower part), in place; returns its negative pivots. */
function factorDense(S: Float64Array, m: number): number {
  let negative = 0
  for (let j = 0; j < m; j++) {
    let d = S[j * m + j]!
    for (let k = 0; k < j; k++) d -= S[j * m + k]! ** 2 * S[k * m + k]!
    if (d === 0) d = 1e-300
    if (d < 0) negative++
    S[j * m + j] = d
    for (let i = j + 1; i < m; i++) {
      let value = S[i * m + j]!
      for (let k = 0; k < j; k++) value -= S[i * m + k]! * S[j * m + k]! * S[k * m + k]!
      S[i * m + j] = value / d
    }
  }
  return negative
}

/** Solves T(λ) y = y₀ in place, after `factorAt`. */
function solveAt(mesh: BucklingMesh, lambda: number): void {
  const n = mesh.unknowns
  const m = mesh.restraints
  const { T, U, W, S, y, z } = room
  solveBand(T, n, y)
  if (m === 0) return
  for (let j = 0; j < m; j++) {
    let dot = 0
    for (let i = 0; i < n; i++) dot += U[j * n + i]! * y[i]!
    z[j] = -lambda * dot
  }
  for (let j = 0; j < m; j++) for (let k = 0; k < j; k++) z[j] = z[j]! - S[j * m + k]! * z[k]!
  for (let j = 0; j < m; j++) z[j] = z[j]! / S[j * m + j]!
  for (let j = m - 1; j >= 0; j--) for (let i = j + 1; i < m; i++) z[j] = z[j]! - S[i * m + j]! * z[i]!
  for (let j = 0; j < m; j++) {
    const c = lambda * z[j]!
    for (let i = 0; i < n; i++) y[i] = y[i]! - c * W[j * n + i]!
  }
}

/** The positive root of k − z λ − q λ² = 0: an upper bound of the smallest λ for any shape. */
export function rayleighFactor(k: number, z: number, q: number): number {
  const root = Math.sqrt(z * z + 4 * k * q)
  if (z >= 0) return 2 * k / (z + root)
  return q > 0 ? (root - z) / (2 * q) : Number.POSITIVE_INFINITY
}

function rayleighOf(mesh: BucklingMesh, raised: boolean, shape: Float64Array): number {
  const n = mesh.unknowns
  const { K, Q, Z, U } = room
  let q = quadraticForm(Q, n, shape)
  for (let j = 0; j < mesh.restraints; j++) {
    let dot = 0
    for (let i = 0; i < n; i++) dot += U[j * n + i]! * shape[i]!
    q -= dot * dot
  }
  return rayleighFactor(quadraticForm(K, n, shape), raised ? quadraticForm(Z, n, shape) : 0, Math.max(0, q))
}

/** y ← (Z + 2λ (Q − U Uᵀ)) θ, the right side of inverse iteration. */
function rightSide(mesh: BucklingMesh, lambda: number, raised: boolean): void {
  const n = mesh.unknowns
  const { Q, Z, D, U, theta, y } = room
  for (let i = 0; i < 4 * n; i++) D[i] = 2 * lambda * Q[i]! + (raised ? Z[i]! : 0)
  multiplyBand(D, n, theta, y)
  for (let j = 0; j < mesh.restraints; j++) {
    let dot = 0
    for (let i = 0; i < n; i++) dot += U[j * n + i]! * theta[i]!
    const c = 2 * lambda * dot
    for (let i = 0; i < n; i++) y[i] = y[i]! - c * U[j * n + i]!
  }
}

function normalise(n: number): void {
  const { theta, y } = room
  let largest = 0
  for (let i = 0; i < n; i++) largest = Math.max(largest, Math.abs(y[i]!))
  for (let i = 0; i < n; i++) theta[i] = y[i]! / largest
}

/** Inverse iteration with a fixed shift (0 or a proven lower bound). */
function iterate(mesh: BucklingMesh, raised: boolean, shift: number, start: number, steps: number): number {
  factorAt(mesh, shift, raised)
  let lambda = start
  for (let step = 0; step < steps; step++) {
    rightSide(mesh, lambda, raised)
    solveAt(mesh, shift)
    normalise(mesh.unknowns)
    const next = rayleighOf(mesh, raised, room.theta)
    const settled = Math.abs(next - lambda) <= 1e-12 * next
    lambda = next
    if (settled) break
  }
  return lambda
}

/** Iteration with the moving shift of Rayleigh: cubic, to the eigenvalue next to the start. */
function refine(mesh: BucklingMesh, raised: boolean, start: number): number {
  let lambda = start
  for (let step = 0; step < 12; step++) {
    factorAt(mesh, lambda, raised)
    rightSide(mesh, lambda, raised)
    solveAt(mesh, lambda)
    normalise(mesh.unknowns)
    const next = rayleighOf(mesh, raised, room.theta)
    const change = Math.abs(next - lambda)
    lambda = next
    // The convergence is cubic: a change of 1e-6 leaves nothing that a double can hold.
    if (change <= 1e-6 * lambda) break
  }
  return lambda
}

/** Steps from the trial shape, so that the moving shift begins next to the smallest eigenvalue. */
const STEPS_TO_START = 2
/** How far below a found eigenvalue there must be none. */
const PROOF = 1e-7

/**
 * The smallest positive factor on the loads at which the stretch buckles sideways; Infinity where
 * there is neither moment nor raised load. Energy: G It θ'² + E Iw θ''² − λ² M²θ²/(E Iz) − λ q zg θ²,
 * the lateral displacement being eliminated exactly (E Iz v'' = −λ M θ + what the restraints give).
 * N, mm. The result is proven the smallest by the signs of the pivots just below it.
 * `scale` multiplies the loads first: with 1/MEd the result is Mcr itself, whatever the size of the loads.
 */
export function criticalFactor(
  mesh: BucklingMesh, loads: BucklingLoads, zg: number, EIz: number, GIt: number, EIw: number, scale = 1,
): number {
  makeRoom(mesh.unknowns, mesh.restraints)
  const raised = geometry(mesh, loads, zg, EIz, scale)
  stiffness(mesh, GIt, EIw)
  room.theta.set(mesh.trial)
  let lambda = rayleighOf(mesh, raised, room.theta)
  if (!Number.isFinite(lambda) || lambda === 0) return Number.POSITIVE_INFINITY
  if (mesh.restraints > 0) lambda = iterate(mesh, raised, 0, lambda, STEPS_TO_START)
  const found = refine(mesh, raised, lambda)
  if (factorAt(mesh, found * (1 - PROOF), raised) === 0) return found
  return smallestByBisection(mesh, raised, found)
}

/** Brackets the smallest eigenvalue by counting those below a shift, then iterates from below it. */
function smallestByBisection(mesh: BucklingMesh, raised: boolean, found: number): number {
  let low = 0
  let high = found * (1 - PROOF)
  while (high - low > 1e-3 * high) {
    const middle = (low + high) / 2
    if (factorAt(mesh, middle, raised) === 0) low = middle
    else high = middle
  }
  for (let i = 0; i < mesh.unknowns; i++) room.theta[i] = mesh.fixed[i] === 1 ? 0 : Math.sin(1 + 2.399963 * i)
  const lambda = iterate(mesh, raised, low, high, 200)
  if (factorAt(mesh, lambda * (1 - PROOF), raised) === 0) return lambda
  while (high - low > 1e-12 * high) {
    const middle = (low + high) / 2
    if (factorAt(mesh, middle, raised) === 0) low = middle
    else high = middle
  }
  return low
}
