/** The plate's outline: an orthogonal polygon, first point not repeated. mm. */
import { type Interval, type Point, type Rectangle, areaOf, distinctRising } from './rectangles'

/** One side of the outline. `inward` is the sign of the direction to the slab across the edge. */
export interface OutlineEdge {
  axis: 'x' | 'y'
  /** Coordinate across the edge. */
  at: number
  from: number
  to: number
  inward: 1 | -1
  index: number
}

/** What is wrong with an outline, or null: its sides must be parallel to the axes and may not cross. */
export function outlineFault(outline: readonly Point[]): { message: string, index: number } | null {
  if (outline.length < 4) return { message: 'An outline needs at least four corners.', index: 0 }
  for (let i = 0; i < outline.length; i++) {
    const [x, y] = outline[i]!
    const [nx, ny] = outline[(i + 1) % outline.length]!
    if (x === nx && y === ny) return { message: 'Two corners of the outline that follow each other are the same point.', index: i }
    if (x !== nx && y !== ny) {
      return { message: `The outline runs askew from (${x}, ${y}) to (${nx}, ${ny}); its sides must be parallel to the grid.`, index: i }
    }
  }
  return crossingFault(outline)
}

function crossingFault(outline: readonly Point[]): { message: string, index: number } | null {
  const count = outline.length
  for (let i = 0; i < count; i++) {
    for (let j = i + 1; j < count; j++) {
      const adjacent = j === i + 1 || (i === 0 && j === count - 1)
      if (sidesMeet(sideBox(outline, i), sideBox(outline, j), adjacent)) {
        const [x, y] = outline[j]!
        return { message: `The outline crosses or touches itself near (${x}, ${y}).`, index: j }
      }
    }
  }
  return null
}

function sideBox(outline: readonly Point[], i: number): Rectangle {
  const [ax, ay] = outline[i]!
  const [bx, by] = outline[(i + 1) % outline.length]!
  return { x0: Math.min(ax, bx), x1: Math.max(ax, bx), y0: Math.min(ay, by), y1: Math.max(ay, by) }
}

function sidesMeet(a: Rectangle, b: Rectangle, adjacent: boolean): boolean {
  const width = Math.min(a.x1, b.x1) - Math.max(a.x0, b.x0)
  const height = Math.min(a.y1, b.y1) - Math.max(a.y0, b.y0)
  if (width < 0 || height < 0) return false
  return adjacent ? width > 0 || height > 0 : true
}

/** Area by the shoelace formula, mm². */
export function outlineArea(outline: readonly Point[]): number {
  return Math.abs(signedDoubleArea(outline)) / 2
}

function signedDoubleArea(outline: readonly Point[]): number {
  let sum = 0
  for (let i = 0; i < outline.length; i++) {
    const [x, y] = outline[i]!
    const [nx, ny] = outline[(i + 1) % outline.length]!
    sum += x * ny - nx * y
  }
  return sum
}

/** The sides with the direction in which the slab lies. */
export function outlineEdges(outline: readonly Point[]): OutlineEdge[] {
  const anticlockwise = signedDoubleArea(outline) > 0
  return outline.map(([x, y], index) => {
    const [nx, ny] = outline[(index + 1) % outline.length]!
    if (y === ny) {
      const inward = (nx > x) === anticlockwise ? 1 : -1
      return { axis: 'x', at: y, from: Math.min(x, nx), to: Math.max(x, nx), inward, index }
    }
    const inward = (ny > y) === anticlockwise ? -1 : 1
    return { axis: 'y', at: x, from: Math.min(y, ny), to: Math.max(y, ny), inward, index }
  })
}

/** The outline cut into rectangles, one row between each two neighbouring corner heights. */
export function outlineRectangles(outline: readonly Point[]): Rectangle[] {
  const rows = distinctRising(outline.map(point => point[1]))
  const rectangles: Rectangle[] = []
  for (let r = 0; r + 1 < rows.length; r++) {
    const y0 = rows[r]!
    const y1 = rows[r + 1]!
    for (const { from, to } of insideAlongX(outline, (y0 + y1) / 2)) rectangles.push({ x0: from, x1: to, y0, y1 })
  }
  return rectangles
}

/** Intervals of x inside the outline at height y; y may not be a corner's height. */
function insideAlongX(outline: readonly Point[], y: number): Interval[] {
  const crossings: number[] = []
  for (let i = 0; i < outline.length; i++) {
    const [x, ay] = outline[i]!
    const [nx, by] = outline[(i + 1) % outline.length]!
    if (x === nx && (ay > y) !== (by > y)) crossings.push(x)
  }
  crossings.sort((a, b) => a - b)
  const intervals: Interval[] = []
  for (let i = 0; i + 1 < crossings.length; i += 2) intervals.push({ from: crossings[i]!, to: crossings[i + 1]! })
  return intervals
}

/** Whether a point lies inside the outline or on it. `rectangles` are those of {@link outlineRectangles}. */
export function isInsideOrOn(rectangles: readonly Rectangle[], x: number, y: number): boolean {
  return rectangles.some(r => x >= r.x0 && x <= r.x1 && y >= r.y0 && y <= r.y1)
}

/** Whether a point lies inside; for points that are on no corner's coordinates. */
export function coveredArea(rectangles: readonly Rectangle[], box: Rectangle): number {
  let area = 0
  for (const r of rectangles) {
    const width = Math.min(r.x1, box.x1) - Math.max(r.x0, box.x0)
    const height = Math.min(r.y1, box.y1) - Math.max(r.y0, box.y0)
    if (width > 0 && height > 0) area += width * height
  }
  return area
}

/** Whether a rectangle lies wholly inside the outline. */
export function isWhollyInside(rectangles: readonly Rectangle[], box: Rectangle): boolean {
  return coveredArea(rectangles, box) >= areaOf(box) * (1 - 1e-12)
}
