/**
 * The grid laid over the outline: which bays carry slab, which beam lines run between neighbouring
 * grid crossings, where columns stand, and who takes the slab beyond the outer beam lines.
 */
import { coveredArea, isWhollyInside } from './outline'
import type { PlateModel } from './model'
import { type Axis, type Rectangle, TOLERANCE, areaOf, distinctRising } from './rectangles'

export interface Grid { xs: readonly number[], ys: readonly number[] }

/** A beam line between two neighbouring crossings: along x from crossing (i, j) to (i + 1, j), along y to (i, j + 1). */
export interface Link { axis: Axis, i: number, j: number }

export interface BayGrid {
  grid: Grid
  /** `full[i][j]`: the bay between lines i, i + 1 and j, j + 1 lies wholly inside the outline. */
  full: boolean[][]
  /** Slab outside the full bays, cut at all grid lines and corners. */
  beyond: Rectangle[]
}

export function bayGrid(model: PlateModel, grid: Grid): BayGrid {
  const { xs, ys } = grid
  const full: boolean[][] = []
  for (let i = 0; i + 1 < xs.length; i++) {
    const column: boolean[] = []
    for (let j = 0; j + 1 < ys.length; j++) column.push(isWhollyInside(model.outline, bayBox(grid, i, j)))
    full.push(column)
  }
  return { grid, full, beyond: slabBeyond(model, grid, full) }
}

export function bayBox({ xs, ys }: Grid, i: number, j: number): Rectangle {
  return { x0: xs[i]!, x1: xs[i + 1]!, y0: ys[j]!, y1: ys[j + 1]! }
}

export function isFull(bays: BayGrid, i: number, j: number): boolean {
  return bays.full[i]?.[j] ?? false
}

/** The two bays beside a link: below and above (along x), left and right (along y). */
export function baysBeside(bays: BayGrid, { axis, i, j }: Link): [boolean, boolean] {
  return axis === 'x'
    ? [isFull(bays, i, j - 1), isFull(bays, i, j)]
    : [isFull(bays, i - 1, j), isFull(bays, i, j)]
}

export function hasLink(bays: BayGrid, link: Link): boolean {
  const [before, behind] = baysBeside(bays, link)
  return before || behind
}

/** On the outline: a full bay on one side only. */
export function isOuterLink(bays: BayGrid, link: Link): boolean {
  const [before, behind] = baysBeside(bays, link)
  return before !== behind
}

/** A crossing that belongs to the frame: some full bay has its corner there. */
export function isCrossing(bays: BayGrid, i: number, j: number): boolean {
  return isFull(bays, i, j) || isFull(bays, i - 1, j) || isFull(bays, i, j - 1) || isFull(bays, i - 1, j - 1)
}

/** A corner of the frame, convex or re-entrant: its full bays are one, three, or two across from each other. */
export function isCornerCrossing(bays: BayGrid, i: number, j: number): boolean {
  const a = isFull(bays, i - 1, j - 1)
  const b = isFull(bays, i, j - 1)
  const c = isFull(bays, i - 1, j)
  const d = isFull(bays, i, j)
  const count = Number(a) + Number(b) + Number(c) + Number(d)
  return count === 1 || count === 3 || (count === 2 && a === d)
}

function slabBeyond(model: PlateModel, { xs, ys }: Grid, full: boolean[][]): Rectangle[] {
  const gx = distinctRising([...xs, ...model.outline.flatMap(r => [r.x0, r.x1])])
  const gy = distinctRising([...ys, ...model.outline.flatMap(r => [r.y0, r.y1])])
  const pieces: Rectangle[] = []
  for (let a = 0; a + 1 < gx.length; a++) {
    for (let b = 0; b + 1 < gy.length; b++) {
      const piece = { x0: gx[a]!, x1: gx[a + 1]!, y0: gy[b]!, y1: gy[b + 1]! }
      const i = intervalOf(xs, (piece.x0 + piece.x1) / 2)
      const j = intervalOf(ys, (piece.y0 + piece.y1) / 2)
      if (full[i]?.[j]) continue
      if (coveredArea(model.outline, piece) >= areaOf(piece) * (1 - 1e-12)) pieces.push(piece)
    }
  }
  return pieces
}

/** Index i with lines[i] < value < lines[i + 1]; −1 or the last index outside. */
export function intervalOf(lines: readonly number[], value: number): number {
  let i = -1
  while (i + 1 < lines.length && lines[i + 1]! < value) i++
  return i
}

export type BeyondOwner
  = { kind: 'link', link: Link }
    | { kind: 'both', links: [Link, Link], crossing: { i: number, j: number } }
    | { kind: 'crossing', i: number, j: number }

/**
 * Who takes a piece of slab beyond the full bays: the outer beam line that it lies before, the
 * crossing at a convex corner, or two beam lines before a re-entrant corner. null: nobody within
 * the overhang limit.
 */
export function ownerBeyond(model: PlateModel, bays: BayGrid, piece: Rectangle): BeyondOwner | null {
  const alongX = linkBefore(model, bays, piece, 'x')
  const alongY = linkBefore(model, bays, piece, 'y')
  if (alongX && alongY) {
    const crossing = nearestCrossing(model, bays, piece)
    return crossing ? { kind: 'both', links: [alongX, alongY], crossing } : { kind: 'link', link: alongX }
  }
  if (alongX) return { kind: 'link', link: alongX }
  if (alongY) return { kind: 'link', link: alongY }
  const crossing = nearestCrossing(model, bays, piece)
  return crossing ? { kind: 'crossing', ...crossing } : null
}

function linkBefore(model: PlateModel, bays: BayGrid, piece: Rectangle, axis: Axis): Link | null {
  const { xs, ys } = bays.grid
  const limit = model.plate.overhang + TOLERANCE
  const lines = axis === 'x' ? ys : xs
  const run = axis === 'x' ? intervalOf(xs, (piece.x0 + piece.x1) / 2) : intervalOf(ys, (piece.y0 + piece.y1) / 2)
  const near = axis === 'x' ? { from: piece.y0, to: piece.y1 } : { from: piece.x0, to: piece.x1 }
  let best: { link: Link, distance: number } | null = null
  for (let l = 0; l < lines.length; l++) {
    const at = lines[l]!
    const distance = Math.max(near.to - at, at - near.from)
    if (distance > limit || (near.from < at && near.to > at)) continue
    const link: Link = axis === 'x' ? { axis, i: run, j: l } : { axis, i: l, j: run }
    if (!isOuterLink(bays, link) || !outsideSide(bays, link, (near.from + near.to) / 2 > at)) continue
    const reach: Rectangle = axis === 'x'
      ? { x0: piece.x0, x1: piece.x1, y0: Math.min(at, piece.y0), y1: Math.max(at, piece.y1) }
      : { y0: piece.y0, y1: piece.y1, x0: Math.min(at, piece.x0), x1: Math.max(at, piece.x1) }
    if (!isWhollyInside(model.outline, reach)) continue
    if (!best || distance < best.distance) best = { link, distance }
  }
  return best ? best.link : null
}

/** Whether the side of an outer link behind (true) or before (false) the line is the outer one. */
function outsideSide(bays: BayGrid, link: Link, behind: boolean): boolean {
  const [fullBefore, fullBehind] = baysBeside(bays, link)
  return behind ? !fullBehind : !fullBefore
}

export function nearestCrossing(model: PlateModel, bays: BayGrid, piece: Rectangle): { i: number, j: number } | null {
  const limit = model.plate.overhang + TOLERANCE
  let best: { i: number, j: number, distance: number } | null = null
  bays.grid.xs.forEach((x, i) => bays.grid.ys.forEach((y, j) => {
    if (!isCrossing(bays, i, j)) return
    const dx = Math.max(piece.x1 - x, x - piece.x0)
    const dy = Math.max(piece.y1 - y, y - piece.y0)
    if (dx > limit || dy > limit) return
    const distance = dx + dy
    if (!best || distance < best.distance) best = { i, j, distance }
  }))
  return best
}
