/** Grids one step away from a grid: one free line moved by a module, or one equal bay more or less. mm */
import type { StudyInput } from '#shared/schemas/study'
import type { Axis, Grid } from '../plate'
import { pinnedLines } from './layouts'

/** More moves than this are thinned out evenly: a bound on the time. */
const MOST_MOVES = 24
/** No bay becomes shorter than this. */
const SHORTEST_BAY = 1000

export function movedGrids({ plate, range }: StudyInput, grid: Grid): Grid[] {
  const moved = (['x', 'y'] as const).flatMap((axis): Grid[] => {
    const bays = range[axis]
    const lines = axis === 'x' ? grid.xs : grid.ys
    if (bays.kind === 'fixed') return []
    const pinned = pinnedLines(plate, axis)
    const others = bays.kind === 'module' ? movedLines(lines, pinned, bays.module) : otherCounts(lines, pinned)
    return others.map(line => withLines(grid, axis, line))
  })
  const stride = Math.ceil(moved.length / MOST_MOVES)
  return moved.filter((_, n) => n % Math.max(1, stride) === 0)
}

function withLines(grid: Grid, axis: Axis, lines: number[]): Grid {
  return axis === 'x' ? { ...grid, xs: lines } : { ...grid, ys: lines }
}

function movedLines(lines: readonly number[], pinned: readonly number[], module: number): number[][] {
  return lines.flatMap((at, n) => pinned.includes(at)
    ? []
    : [-module, module].flatMap((step) => {
        const there = at + step
        const fits = there - lines[n - 1]! >= SHORTEST_BAY && lines[n + 1]! - there >= SHORTEST_BAY
        return fits ? [lines.map((line, k) => k === n ? there : line)] : []
      }))
}

/** In each stretch between pinned lines one bay less and one more, rounded as the range rounds. */
function otherCounts(lines: readonly number[], pinned: readonly number[]): number[][] {
  const all: number[][] = []
  for (let p = 0; p + 1 < pinned.length; p++) {
    const [from, to] = [pinned[p]!, pinned[p + 1]!]
    const bays = lines.filter(at => at > from && at < to).length + 1
    for (const count of [bays - 1, bays + 1]) {
      if (count < 1 || (to - from) / count < SHORTEST_BAY) continue
      const inside = Array.from({ length: count - 1 }, (_, i) => from + Math.floor((to - from) * (i + 1) / count + 0.5))
      all.push([...lines.filter(at => at <= from), ...inside, ...lines.filter(at => at >= to)])
    }
  }
  return all
}
