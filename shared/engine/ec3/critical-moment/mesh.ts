/**
 * Mesh of one stretch of beam between forks for the Vlasov eigenvalue: cubic Hermite elements for
 * the twist θ, unknowns θ and θ'·L at every mesh point. The mesh follows the restraints only, so it is
 * the same whichever way the beam is looked at; the moment diagram is integrated exactly piece by piece.
 * Everything but `start` and `length` is for a stretch of length 1.
 * Symmetric band matrices are kept as 4 numbers a row: A[i][i] … A[i][i + 3].
 */
export interface BucklingMesh extends UnitMesh {
  /** First station of the stretch, to which `interval` and `stationIndex` are counted. */
  start: number
  /** mm. */
  length: number
}

interface UnitMesh {
  /** Number of unknowns, the fixed ones included. */
  unknowns: number
  /** 1 where the unknown is fixed (no twist at forks). */
  fixed: Uint8Array
  /** ∫ θ'² and ∫ θ''², band form. */
  bend1: Float64Array
  bend2: Float64Array
  /** Points of integration: station interval, distance from its start, weight, first unknown, 4 shape values. */
  points: number
  interval: Int32Array
  offset: Float64Array
  weight: Float64Array
  first: Int32Array
  shape: Float64Array
  /** Stations inside the stretch, where concentrated loads may act: station, first unknown, 4 shape values. */
  stations: number
  stationIndex: Int32Array
  stationFirst: Int32Array
  stationShape: Float64Array
  /** Restraints inside: hat function m_j at every point of integration, and the Cholesky factor of ∫ m_i m_j. */
  restraints: number
  hats: Float64Array
  hatFactor: Float64Array
  /** Trial shape. */
  trial: Float64Array
}

/**
 * Four-point Gauss rule on 0 … 1: exact to the seventh degree. M²θ² reaches the tenth, whose last three
 * degrees count for nothing over one element (3·10⁻⁸ of Mcr in 20 000 random beams, beside six points).
 */
const GAUSS_X = [0.06943184420297371, 0.3300094782075719, 0.6699905217924281, 0.9305681557970262]
const GAUSS_W = [0.17392742256872692, 0.3260725774312731, 0.3260725774312731, 0.17392742256872692]
const GAUSS = 4

/** Elements of a stretch without restraints inside, when the caller does not say. */
export const ELEMENTS = 8
/** Elements of the longest of several pieces none of which prevails, when the caller does not say. */
const ELEMENTS_BETWEEN = 6
/** A piece that is longer than this share of the stretch prevails: it has the elements of a stretch of its own. */
const PREVAILING_SHARE = 0.4
/** A piece between restraints that is shorter than this share of the stretch is one element. */
const LEAST_SHARE = 0.02

function hermite(t: number, h: number, out: Float64Array, at: number): void {
  const t2 = t * t
  const t3 = t2 * t
  out[at] = 1 - 3 * t2 + 2 * t3
  out[at + 1] = (t - 2 * t2 + t3) * h
  out[at + 2] = 3 * t2 - 2 * t3
  out[at + 3] = (t3 - t2) * h
}

/** Adds ∫ N'N' and ∫ N''N'' of an element of length h to the bands. */
function addElement(bend1: Float64Array, bend2: Float64Array, first: number, s: number): void {
  const one = [[6 / 5, s / 10, -6 / 5, s / 10], [0, 2 * s * s / 15, -s / 10, -s * s / 30], [0, 0, 6 / 5, -s / 10], [0, 0, 0, 2 * s * s / 15]]
  const two = [[12, 6 * s, -12, 6 * s], [0, 4 * s * s, -6 * s, 2 * s * s], [0, 0, 12, -6 * s], [0, 0, 0, 4 * s * s]]
  for (let a = 0; a < 4; a++) {
    for (let b = a; b < 4; b++) {
      const at = 4 * (first + a) + (b - a)
      bend1[at] = bend1[at]! + one[a]![b]! / s
      bend2[at] = bend2[at]! + two[a]![b]! / (s * s * s)
    }
  }
}

/** Rounding of lengths must not make a beam and its mirror image differ. */
const ROUNDING = 1e-9

/** Elements of each piece: as many as asked for, or in proportion to the longest, at least half as many. */
function partsOf(knots: readonly number[], elements: number | undefined): number[] {
  const lengths = knots.slice(1).map((knot, k) => knot - knots[k]!)
  const longest = Math.max(...lengths)
  const most = longest > PREVAILING_SHARE + ROUNDING ? ELEMENTS : ELEMENTS_BETWEEN
  return lengths.map((length) => {
    if (length < LEAST_SHARE - ROUNDING) return 1
    return elements ?? Math.ceil(most * Math.min(1, Math.max(0.5, 1.5 * length / longest)) - ROUNDING)
  })
}

/** Mesh points: the forks and restraints, with equal parts in between; loads may lie inside elements. */
function meshPoints(knots: readonly number[], elements: number | undefined): { at: number, isKnot: boolean }[] {
  const pieces = partsOf(knots, elements)
  const all = [{ at: 0, isKnot: true }]
  for (let k = 1; k < knots.length; k++) {
    const a = knots[k - 1]!
    const b = knots[k]!
    const parts = pieces[k - 1]!
    for (let p = 1; p < parts; p++) all.push({ at: a + (b - a) * p / parts, isKnot: false })
    all.push({ at: b, isKnot: true })
  }
  return all
}

/** Mesh of a stretch of length 1 with stations at `places` (0 and 1 included) and restraints at `knots`. */
function unitMesh(places: readonly number[], knots: readonly number[], elements?: number): UnitMesh {
  const mesh = meshPoints(knots, elements)
  const unknowns = 2 * mesh.length
  const fixed = new Uint8Array(unknowns)
  const bend1 = new Float64Array(4 * unknowns)
  const bend2 = new Float64Array(4 * unknowns)
  mesh.forEach((point, k) => {
    if (point.isKnot) fixed[2 * k] = 1
    if (k > 0) addElement(bend1, bend2, 2 * (k - 1), point.at - mesh[k - 1]!.at)
  })
  const at = mesh.map(point => point.at)
  const integration = integrationPoints(places, at)
  return {
    unknowns, fixed, bend1, bend2,
    ...integration,
    ...stationShapes(places, at),
    ...hatFunctions(places, knots, integration),
    trial: trialShape(knots, at),
  }
}

/** Most stretches have neither a load step nor a restraint inside: they share one mesh. */
const PLAIN = unitMesh([0, 1], [0, 1])

/**
 * Mesh of the stretch between stations `from` and `to` (forks at both ends). `held[i] = 1` marks a
 * restraint at station i inside the stretch. `elements`: so many on each piece between restraints.
 */
export function buildMesh(x: ArrayLike<number>, from: number, to: number, held: ArrayLike<number>, elements?: number): BucklingMesh {
  const length = x[to]! - x[from]!
  if (to === from + 1 && elements === undefined) return { start: from, length, ...PLAIN }
  const places = [0]
  const knots = [0]
  for (let i = from + 1; i < to; i++) {
    const place = (x[i]! - x[from]!) / length
    places.push(place)
    if (held[i] === 1) knots.push(place)
  }
  places.push(1)
  knots.push(1)
  return { start: from, length, ...unitMesh(places, knots, elements) }
}

type Integration = Pick<UnitMesh, 'points' | 'interval' | 'offset' | 'weight' | 'first' | 'shape'>

function integrationPoints(places: readonly number[], at: readonly number[]): Integration {
  const most = GAUSS * (places.length + at.length)
  const interval = new Int32Array(most)
  const offset = new Float64Array(most)
  const weight = new Float64Array(most)
  const first = new Int32Array(most)
  const shape = new Float64Array(4 * most)
  let points = 0
  let element = 0
  for (let i = 0; i < places.length - 1; i++) {
    let a = places[i]!
    const end = places[i + 1]!
    while (a < end) {
      while (element < at.length - 2 && a >= at[element + 1]!) element++
      const b = Math.min(end, at[element + 1]! > a ? at[element + 1]! : end)
      const h = at[element + 1]! - at[element]!
      for (let g = 0; g < GAUSS; g++) {
        const position = a + (b - a) * GAUSS_X[g]!
        hermite((position - at[element]!) / h, h, shape, 4 * points)
        interval[points] = i
        offset[points] = position - places[i]!
        weight[points] = (b - a) * GAUSS_W[g]!
        first[points] = 2 * element
        points++
      }
      a = b
    }
  }
  return { points, interval, offset, weight, first, shape }
}

type StationShapes = Pick<UnitMesh, 'stations' | 'stationIndex' | 'stationFirst' | 'stationShape'>

function stationShapes(places: readonly number[], at: readonly number[]): StationShapes {
  const stations = places.length - 2
  const stationIndex = new Int32Array(stations)
  const stationFirst = new Int32Array(stations)
  const stationShape = new Float64Array(4 * stations)
  let element = 0
  for (let k = 0; k < stations; k++) {
    const position = places[k + 1]!
    while (element < at.length - 2 && position >= at[element + 1]!) element++
    const h = at[element + 1]! - at[element]!
    hermite((position - at[element]!) / h, h, stationShape, 4 * k)
    stationIndex[k] = k + 1
    stationFirst[k] = 2 * element
  }
  return { stations, stationIndex, stationFirst, stationShape }
}

type Hats = Pick<UnitMesh, 'restraints' | 'hats' | 'hatFactor'>

/** Hat functions over the restraints inside: the moment diagrams that their lateral reactions can make. */
function hatFunctions(places: readonly number[], knots: readonly number[], { points, interval, offset }: Integration): Hats {
  const m = knots.length - 2
  const hats = new Float64Array(m * points)
  for (let j = 0; j < m; j++) {
    const [left, peak, right] = [knots[j]!, knots[j + 1]!, knots[j + 2]!]
    for (let p = 0; p < points; p++) {
      const position = places[interval[p]!]! + offset[p]!
      const value = position <= peak ? (position - left) / (peak - left) : (right - position) / (right - peak)
      hats[j * points + p] = Math.max(0, value)
    }
  }
  const factor = new Float64Array(m * m)
  for (let j = 0; j < m; j++) {
    const before = j > 0 ? (knots[j + 1]! - knots[j]!) / 6 : 0
    const off = j > 0 ? before / factor[(j - 1) * m + j - 1]! : 0
    if (j > 0) factor[j * m + j - 1] = off
    factor[j * m + j] = Math.sqrt((knots[j + 2]! - knots[j]!) / 3 - off * off)
  }
  return { restraints: m, hats, hatFactor: factor }
}

/** Half a sine between forks; with restraints inside half sines of changing sign and length-weighted height. */
function trialShape(knots: readonly number[], at: readonly number[]): Float64Array {
  const trial = new Float64Array(2 * at.length)
  let piece = 0
  at.forEach((position, k) => {
    while (piece < knots.length - 2 && position >= knots[piece + 1]!) piece++
    const l = knots[piece + 1]! - knots[piece]!
    const height = (piece % 2 === 0 ? 1 : -1) * l ** 2 * (1 + 0.1 * piece)
    const angle = Math.PI * (position - knots[piece]!) / l
    trial[2 * k] = knots.includes(position) ? 0 : height * Math.sin(angle)
    trial[2 * k + 1] = height * Math.PI / l * Math.cos(angle)
  })
  return trial
}
