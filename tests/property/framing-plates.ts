/** Plates made up by fast-check: any outline of whole bays with overhangs, voids, zones, line loads, omitted columns, regions. mm. */
import fc from 'fast-check'
import type { Arrangement } from '#shared/engine/framing'
import { checkPlate } from '#shared/engine/plate'
import { type Plate, type PlateInput, PlateSchema } from '#shared/schemas/plate'

type Corner = [number, number]
export interface Box { x: number, y: number, width: number, height: number }

/**
 * A rectangle in shares of the plate: anywhere, on grid lines, up to `gap` off grid lines, or beside
 * the rectangle before it with that gap between.
 */
interface Wish { x: number, y: number, w: number, h: number, place: 'free' | 'lines' | 'near lines' | 'beside', gap: number, size: 'bay' | 'plate' }

const share = fc.integer({ min: 0, max: 1000 }).map(n => n / 1000)
const wish: fc.Arbitrary<Wish> = fc.record({
  x: share, y: share, w: share, h: share, size: fc.constantFrom('bay' as const, 'plate' as const),
  place: fc.constantFrom('free' as const, 'lines' as const, 'near lines' as const, 'beside' as const),
  gap: fc.constantFrom(0, 100, 300, 600, 601, -200, 450),
})
const bay = fc.oneof(fc.integer({ min: 2000, max: 12_000 }), fc.constantFrom(3000, 6000, 7200, 7500, 9000))
const kiloNewton = fc.integer({ min: 0, max: 80 }).map(n => n / 10)

export interface Wishes {
  baysX: number[]
  baysY: number[]
  shape: 'rectangle' | 'L' | 'T' | 'U' | 'notches'
  cut: [number, number, number]
  turned: boolean
  overhangs: number[]
  voids: Wish[]
  zones: (Wish & { permanent: number, variable: number, category: 'B' | 'C3' | 'E1', span: 'x' | 'y' | 'free' | 'own' })[]
  outlineLoad: number
  lines: { axis: 'x' | 'y', at: number, from: number, to: number, snap: boolean, load: number }[]
  voidLoads: number
  omitted: { i: number, j: number, line: 'x' | 'y' }[]
  split: { axis: 'x' | 'y', at: number } | null
  framing: { direction: 'x' | 'y', divisions: number }[]
  fixed: boolean
}

const bays = fc.array(bay, { minLength: 1, maxLength: 8 })
const framing = fc.record({ direction: fc.constantFrom('x' as const, 'y' as const), divisions: fc.integer({ min: 1, max: 5 }) })

export const wishes: fc.Arbitrary<Wishes> = fc.record({
  baysX: bays,
  baysY: bays,
  shape: fc.constantFrom('rectangle' as const, 'L' as const, 'T' as const, 'U' as const, 'notches' as const),
  cut: fc.tuple(share, share, share),
  turned: fc.boolean(),
  overhangs: fc.array(fc.constantFrom(0, 0, 250, 333, 600), { minLength: 1, maxLength: 4 }),
  voids: fc.array(wish, { maxLength: 4 }),
  zones: fc.array(fc.tuple(wish, fc.record({
    permanent: kiloNewton, variable: kiloNewton, category: fc.constantFrom('B' as const, 'C3' as const, 'E1' as const),
    span: fc.constantFrom('own' as const, 'own' as const, 'free' as const, 'x' as const, 'y' as const),
  })).map(([a, b]) => ({ ...a, ...b })), { maxLength: 3 }),
  outlineLoad: fc.constantFrom(0, 4, 6.5),
  lines: fc.array(fc.record({
    axis: fc.constantFrom('x' as const, 'y' as const), at: share, from: share, to: share, snap: fc.boolean(), load: kiloNewton,
  }), { maxLength: 3 }),
  voidLoads: fc.integer({ min: 0, max: 4 }),
  omitted: fc.array(fc.record({
    i: fc.integer({ min: 0, max: 8 }), j: fc.integer({ min: 0, max: 8 }), line: fc.constantFrom('x' as const, 'y' as const),
  }), { maxLength: 2 }),
  split: fc.option(fc.record({ axis: fc.constantFrom('x' as const, 'y' as const), at: share }), { freq: 3 }),
  framing: fc.array(framing, { minLength: 2, maxLength: 2 }),
  fixed: fc.boolean(),
})

export function linesAt(sizes: readonly number[]): number[] {
  return sizes.reduce((lines, size) => [...lines, lines[lines.length - 1]! + size], [0])
}

/** Which bays the shape keeps. */
function keptBays({ shape, cut, turned }: Wishes, nx: number, ny: number): boolean[][] {
  const at = (share: number, n: number) => Math.min(n - 1, Math.max(1, Math.round(share * n)))
  const kept = Array.from({ length: nx }, () => new Array<boolean>(ny).fill(true))
  const drop = (i0: number, i1: number, j0: number, j1: number) => {
    for (let i = Math.max(0, i0); i < Math.min(nx, i1); i++) for (let j = Math.max(0, j0); j < Math.min(ny, j1); j++) kept[i]![j] = false
  }
  const [a, b, c] = cut
  if (nx < 2 || ny < 2 || shape === 'rectangle') return kept
  const [p, q] = [at(a, nx), at(b, ny)]
  if (shape === 'L') drop(turned ? 0 : p, turned ? p : nx, q, ny)
  if (shape === 'T' && nx > 2) {
    drop(0, Math.max(1, Math.floor(p / 2)), turned ? 0 : q, turned ? q : ny)
    drop(nx - Math.max(1, Math.floor((nx - p) / 2)), nx, turned ? 0 : q, turned ? q : ny)
  }
  if (shape === 'U' && nx > 2) drop(1, Math.max(2, Math.min(nx - 1, p)), turned ? 0 : q, turned ? q : ny)
  if (shape === 'notches') {
    drop(nx - 1, nx, ny - 1, ny)
    if (c > 0.5) drop(0, 1, 0, 1)
  }
  return kept
}

/** The outline round the kept bays, each side moved outwards by an overhang. */
export function outlineRound(xs: readonly number[], ys: readonly number[], kept: readonly (readonly boolean[])[], overhangs: readonly number[]): Corner[] {
  const sides = new Map<string, Corner>()
  const key = ([x, y]: Corner) => `${x}/${y}`
  kept.forEach((column, i) => column.forEach((full, j) => {
    if (!full) return
    const [x0, x1, y0, y1] = [xs[i]!, xs[i + 1]!, ys[j]!, ys[j + 1]!]
    if (!kept[i]?.[j - 1]) sides.set(key([x0, y0]), [x1, y0])
    if (!kept[i + 1]?.[j]) sides.set(key([x1, y0]), [x1, y1])
    if (!kept[i]?.[j + 1]) sides.set(key([x1, y1]), [x0, y1])
    if (!kept[i - 1]?.[j]) sides.set(key([x0, y1]), [x0, y0])
  }))
  const start = [...sides.values()][0]!
  const round: Corner[] = [start]
  for (let at = sides.get(key(start)); at && key(at) !== key(start) && round.length <= sides.size; at = sides.get(key(at))) round.push(at)
  const corners = round.filter((corner, n) => {
    const before = round[(n + round.length - 1) % round.length]!
    const behind = round[(n + 1) % round.length]!
    return !((before[0] === corner[0] && behind[0] === corner[0]) || (before[1] === corner[1] && behind[1] === corner[1]))
  })
  return movedOut(corners, overhangs)
}

/** Anticlockwise sides, each moved outwards. */
function movedOut(corners: Corner[], overhangs: readonly number[]): Corner[] {
  const moved = corners.map(([x, y], n) => {
    const [nx, ny] = corners[(n + 1) % corners.length]!
    const d = overhangs[n % overhangs.length]!
    return y === ny ? { axis: 'x' as const, at: y - Math.sign(nx - x) * d } : { axis: 'y' as const, at: x + Math.sign(ny - y) * d }
  })
  return moved.map((side, n): Corner => {
    const before = moved[(n + moved.length - 1) % moved.length]!
    return side.axis === 'x' ? [before.at, side.at] : [side.at, before.at]
  })
}

function boxOf(w: Wish, xs: readonly number[], ys: readonly number[], before: Box | undefined): Box {
  const one = (start: number, length: number, lines: readonly number[], beside: [number, number] | undefined): [number, number] => {
    const [low, high] = [lines[0]!, lines[lines.length - 1]!]
    const reach = Math.round(w.size === 'bay' ? 400 + length * 3500 : 500 + length * 12_000)
    if (w.place === 'free' || (w.place === 'beside' && !beside)) {
      const from = Math.round(low + start * (high - low))
      return [from, from + reach]
    }
    if (w.place === 'beside') return [beside![start > 0.5 ? 1 : 0] + (start > 0.5 ? Math.abs(w.gap) : 0), beside![1] + (start > 0.5 ? reach : w.gap)]
    const i = Math.min(lines.length - 2, Math.floor(start * (lines.length - 1)))
    const k = Math.min(lines.length - 1, i + 1 + Math.floor(length * 2))
    const off = w.place === 'near lines' ? w.gap : 0
    return [lines[i]! + off, (w.size === 'bay' ? Math.round((lines[i]! + lines[i + 1]!) / 2) : lines[k]!) - off]
  }
  const [x0, x1] = one(w.x, w.w, xs, before && [before.x, before.x + before.width])
  const [y0, y1] = one(w.y, w.h, ys, before && [before.y, before.y + before.height])
  return { x: x0, y: y0, width: Math.max(1, x1 - x0), height: Math.max(1, y1 - y0) }
}

const SLAB = { system: 'deck', depth: 130, weight: 2.75, maxSpan: 20_000, fixedToTopFlange: true, span: 'free' } as const

/** Adds what keeps the plate sound and leaves out what does not. */
class Draft {
  plate: Plate
  constructor(plate: PlateInput) {
    this.plate = PlateSchema.parse(plate)
  }

  isSound(): boolean {
    return checkPlate(this.plate).length === 0
  }

  /** A list grown by one entry, or as it was. */
  tryWith(change: Partial<Plate>): void {
    const before = this.plate
    this.plate = { ...before, ...change }
    if (!this.isSound()) this.plate = before
  }
}

/** A sound plate and an arrangement of it; null where the outline itself is none. */
export function plateFrom(w: Wishes): { plate: Plate, arrangement: Arrangement } | null {
  const [xs, ys] = [linesAt(w.baysX), linesAt(w.baysY)]
  const draft = new Draft({
    format: 'baywright-plate', version: 1, name: 'Made up',
    gridX: xs.map((at, i) => ({ label: String(i + 1), at })),
    gridY: ys.map((at, i) => ({ label: `Y${i}`, at })),
    outline: outlineRound(xs, ys, keptBays(w, xs.length - 1, ys.length - 1), w.overhangs),
    slab: { ...SLAB, fixedToTopFlange: w.fixed },
    floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' },
    storeys: 3, storeyHeight: 4000,
  })
  if (!draft.isSound()) return null
  w.voids.forEach((v, n) => draft.tryWith({ voids: [...draft.plate.voids, { name: `V${n}`, ...boxOf(v, xs, ys, draft.plate.voids.at(-1)) }] }))
  w.zones.forEach(({ permanent, variable, category, span, ...z }, n) => draft.tryWith({
    zones: [...draft.plate.zones, {
      name: `Z${n}`, ...boxOf(z, xs, ys, draft.plate.zones.at(-1)), permanent, variable, category, reducible: category === 'C3', ...(span !== 'own' && { slab: { ...SLAB, span } }),
    }],
  }))
  if (w.outlineLoad > 0) addLineLoad(draft, 'outline', w.outlineLoad)
  w.lines.forEach(line => addLineLoad(draft, placeOf(line, xs, ys), line.load))
  for (const v of draft.plate.voids.slice(0, w.voidLoads)) addLineLoad(draft, { void: v.name }, 3)
  for (const { i, j, line } of w.omitted) {
    const [x, y] = [draft.plate.gridX[i]?.label, draft.plate.gridY[j]?.label]
    if (x && y) draft.tryWith({ omittedColumns: [...draft.plate.omittedColumns, { x, y, line }] })
  }
  if (w.split) draft.tryWith({ regions: splitRegions(w.split, xs, ys) })
  const { plate } = draft
  return { plate, arrangement: { grid: { xs, ys }, regions: w.framing.slice(0, Math.max(1, plate.regions.length)) } }
}

function addLineLoad(draft: Draft, on: Plate['lineLoads'][number]['on'], permanent: number): void {
  const loads = draft.plate.lineLoads
  draft.tryWith({ lineLoads: [...loads, { name: `W${loads.length}`, on, permanent, variable: 0.5 }] })
}

function placeOf({ axis, at, from, to, snap }: Wishes['lines'][number], xs: readonly number[], ys: readonly number[]): { from: Corner, to: Corner } {
  const [own, run] = axis === 'x' ? [ys, xs] : [xs, ys]
  const high = own[own.length - 1]!
  const place = snap ? own[Math.floor(at * (own.length - 0.001))]! : Math.round(at * high)
  const length = run[run.length - 1]!
  const a = Math.round(Math.min(from, to) * length)
  const b = Math.max(a + 1, Math.round(Math.max(from, to) * length))
  return axis === 'x' ? { from: [a, place], to: [b, place] } : { from: [place, a], to: [place, b] }
}

function splitRegions({ axis, at }: { axis: 'x' | 'y', at: number }, xs: readonly number[], ys: readonly number[]): Plate['regions'] {
  const lines = axis === 'x' ? xs : ys
  const cut = lines[Math.floor(at * (lines.length - 0.001))]!
  const [x0, x1, y0, y1] = [-1000, xs[xs.length - 1]! + 1000, -1000, ys[ys.length - 1]! + 1000]
  return axis === 'x'
    ? [{ name: 'R1', x: x0, y: y0, width: cut - x0, height: y1 - y0 }, { name: 'R2', x: cut, y: y0, width: x1 - cut, height: y1 - y0 }]
    : [{ name: 'R1', x: x0, y: y0, width: x1 - x0, height: cut - y0 }, { name: 'R2', x: x0, y: cut, width: x1 - x0, height: y1 - cut }]
}
