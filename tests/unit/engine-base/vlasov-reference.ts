/**
 * Lateral-torsional eigenvalue by a plain finite-element model in v and θ (both cubic), dense, solved by
 * counting negative pivots: another discretisation and another solver than the engine's.
 */
export interface ReferenceBeam {
  length: number
  moment: (x: number) => number
  /** Line load at zg, N/mm, and point loads at zg. */
  line: (x: number) => number
  points: { at: number, P: number }[]
  zg: number
  restraints: number[]
  EIz: number
  GIt: number
  EIw: number
}

const GAUSS: readonly (readonly [number, number])[] = [
  [-0.9324695142031521, 0.1713244923791704], [-0.6612093864662645, 0.3607615730481386], [-0.2386191860831969, 0.467913934572691],
  [0.2386191860831969, 0.467913934572691], [0.6612093864662645, 0.3607615730481386], [0.9324695142031521, 0.1713244923791704],
]

const shape = (t: number, h: number) => [1 - 3 * t ** 2 + 2 * t ** 3, (t - 2 * t ** 2 + t ** 3) * h, 3 * t ** 2 - 2 * t ** 3, (t ** 3 - t ** 2) * h]
const slope = (t: number, h: number) => [(-6 * t + 6 * t ** 2) / h, 1 - 4 * t + 3 * t ** 2, (6 * t - 6 * t ** 2) / h, 3 * t ** 2 - 2 * t]
const bend = (t: number, h: number) => [(-6 + 12 * t) / h ** 2, (-4 + 6 * t) / h, (6 - 12 * t) / h ** 2, (6 * t - 2) / h]

export function referenceFactor(beam: ReferenceBeam, elements: number): number {
  const n = 4 * (elements + 1)
  const h = beam.length / elements
  const K = Array.from({ length: n }, () => new Float64Array(n))
  const Kg = Array.from({ length: n }, () => new Float64Array(n))
  for (let e = 0; e < elements; e++) {
    const v = [4 * e, 4 * e + 1, 4 * e + 4, 4 * e + 5]
    const theta = [4 * e + 2, 4 * e + 3, 4 * e + 6, 4 * e + 7]
    for (const [g, w] of GAUSS) {
      const t = (g + 1) / 2
      const weight = w * h / 2
      const x = (e + t) * h
      const [N, N1, N2] = [shape(t, h), slope(t, h), bend(t, h)]
      for (let a = 0; a < 4; a++) {
        for (let b = 0; b < 4; b++) {
          K[v[a]!]![v[b]!]! += weight * beam.EIz * N2[a]! * N2[b]!
          K[theta[a]!]![theta[b]!]! += weight * (beam.GIt * N1[a]! * N1[b]! + beam.EIw * N2[a]! * N2[b]!)
          const coupling = weight * beam.moment(x) * N2[a]! * N[b]!
          Kg[v[a]!]![theta[b]!]! += coupling
          Kg[theta[b]!]![v[a]!]! += coupling
          Kg[theta[a]!]![theta[b]!]! += weight * beam.line(x) * beam.zg * N[a]! * N[b]!
        }
      }
    }
  }
  for (const { at, P } of beam.points) Kg[4 * Math.round(at / h) + 2]![4 * Math.round(at / h) + 2]! += P * beam.zg
  const fixed = new Set<number>()
  for (const at of [0, beam.length, ...beam.restraints]) {
    fixed.add(4 * Math.round(at / h))
    fixed.add(4 * Math.round(at / h) + 2)
  }
  const free = Array.from({ length: n }, (_, i) => i).filter(i => !fixed.has(i))
  // Slopes scaled by the length: the pivots then have one order of size.
  const scale = free.map(i => i % 2 === 1 ? 1 / beam.length : 1)
  const below = (lambda: number): number => {
    const m = free.length
    const T = free.map((i, a) => Float64Array.from(free, (j, b) => (K[i]![j]! + lambda * Kg[i]![j]! * -1) * scale[a]! * scale[b]!))
    let negative = 0
    for (let k = 0; k < m; k++) {
      const pivot = T[k]![k]!
      if (pivot < 0) negative++
      for (let i = k + 1; i < Math.min(m, k + 9); i++) {
        const f = T[i]![k]! / pivot
        for (let j = k; j < Math.min(m, k + 9); j++) T[i]![j]! -= f * T[k]![j]!
      }
    }
    return negative
  }
  let low = 0
  let high = 1
  while (below(high) === 0) high *= 2
  while (high - low > 1e-9 * high) {
    const middle = (low + high) / 2
    if (below(middle) === 0) low = middle
    else high = middle
  }
  return (low + high) / 2
}
