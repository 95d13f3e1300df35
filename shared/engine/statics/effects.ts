/**
 * A simply supported beam under piecewise uniform line loads and point loads, exactly: everything is
 * kept at stations (supports, load steps, point loads) and is a polynomial in between.
 * N, mm, Nmm; x from the left support, sagging moment and downward load and deflection positive.
 */
export interface LineLoad { from: number, to: number, q: number }
export interface PointLoad { at: number, P: number }

/** Effects at the stations of a `Stations` list; interval i lies between stations i and i + 1. */
export interface Effects {
  /** Line load of each interval, N/mm. */
  q: Float64Array
  /** Point load at each station, N. */
  P: Float64Array
  /** Shear just right of each station, N (0 at the last). */
  V: Float64Array
  /** Moment at each station, Nmm. */
  M: Float64Array
  /** E·I·w' and E·I·w at each station, Nmm² and Nmm³. */
  slope: Float64Array
  sag: Float64Array
  left: number
  right: number
}

/** Stations nearer together than this share of the span are one. */
const SAME = 1e-9

/** Sorted distinct stations of a beam: 0, span and every given place in between. */
export function stationsOf(span: number, places: readonly number[]): Float64Array {
  const sorted = places.filter(x => x > SAME * span && x < span * (1 - SAME)).sort((a, b) => a - b)
  const kept = [0]
  for (const x of sorted) if (x - kept[kept.length - 1]! > SAME * span) kept.push(x)
  kept.push(span)
  return Float64Array.from(kept)
}

/** Index of the station nearest to x. */
export function stationAt(x: Float64Array, place: number): number {
  let low = 0
  let high = x.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (x[middle]! <= place) low = middle
    else high = middle
  }
  return place - x[low]! <= x[high]! - place ? low : high
}

export function emptyEffects(stations: number): Effects {
  return {
    q: new Float64Array(stations),
    P: new Float64Array(stations),
    V: new Float64Array(stations),
    M: new Float64Array(stations),
    slope: new Float64Array(stations),
    sag: new Float64Array(stations),
    left: 0,
    right: 0,
  }
}

/** Effects of a load set on given stations, which must contain every load's ends. */
export function effectsOf(x: Float64Array, line: readonly LineLoad[], point: readonly PointLoad[]): Effects {
  const n = x.length
  const span = x[n - 1]!
  const effects = emptyEffects(n)
  const { q, P } = effects
  for (const load of line) {
    if (load.q === 0) continue
    const to = stationAt(x, load.to)
    for (let i = stationAt(x, load.from); i < to; i++) q[i] = q[i]! + load.q
  }
  for (const load of point) {
    if (load.P === 0) continue
    const i = stationAt(x, load.at)
    P[i] = P[i]! + load.P
  }
  let left = 0
  let right = 0
  for (let i = 0; i < n; i++) {
    left += P[i]! * (span - x[i]!) / span
    right += P[i]! * x[i]! / span
    if (i === n - 1) break
    const length = x[i + 1]! - x[i]!
    const middle = (x[i]! + x[i + 1]!) / 2
    left += q[i]! * length * (span - middle) / span
    right += q[i]! * length * middle / span
  }
  effects.left = left
  effects.right = right
  integrate(x, effects)
  return effects
}

function integrate(x: Float64Array, { q, P, V, M, slope, sag, left }: Effects): void {
  const n = x.length
  V[0] = left - P[0]!
  for (let i = 0; i < n - 1; i++) {
    const h = x[i + 1]! - x[i]!
    V[i + 1] = V[i]! - q[i]! * h - P[i + 1]!
    M[i + 1] = M[i]! + h * (V[i]! - q[i]! * h / 2)
    slope[i + 1] = slope[i]! - h * (M[i]! + h * (V[i]! / 2 - q[i]! * h / 6))
    sag[i + 1] = sag[i]! + h * (slope[i]! - h * (M[i]! / 2 + h * (V[i]! / 6 - q[i]! * h / 24)))
  }
  V[n - 1] = 0
  M[n - 1] = 0
  const first = -sag[n - 1]! / x[n - 1]!
  for (let i = 0; i < n; i++) {
    slope[i] = slope[i]! + first
    sag[i] = sag[i]! + first * x[i]!
  }
  sag[n - 1] = 0
}

/** out ← Σ factor · effects, by station. `out` must be none of the parts. */
export function superpose(out: Effects, parts: readonly (readonly [factor: number, effects: Effects])[]): Effects {
  const n = out.M.length
  out.left = 0
  out.right = 0
  out.q.fill(0)
  out.P.fill(0)
  out.V.fill(0)
  out.M.fill(0)
  out.slope.fill(0)
  out.sag.fill(0)
  for (const [factor, { q, P, V, M, slope, sag, left, right }] of parts) {
    if (factor === 0) continue
    out.left += factor * left
    out.right += factor * right
    for (let i = 0; i < n; i++) {
      out.q[i] = out.q[i]! + factor * q[i]!
      out.P[i] = out.P[i]! + factor * P[i]!
      out.V[i] = out.V[i]! + factor * V[i]!
      out.M[i] = out.M[i]! + factor * M[i]!
      out.slope[i] = out.slope[i]! + factor * slope[i]!
      out.sag[i] = out.sag[i]! + factor * sag[i]!
    }
  }
  return out
}
