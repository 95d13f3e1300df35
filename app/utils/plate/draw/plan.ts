/** The plan itself: grid lines, outline, voids, zones, columns, slab span and line loads. */
import type { Plate } from '#shared/schemas/plate'
import type { ColumnPosition } from '../columns'
import { along, type Frame } from '../frame'
import { screenBox } from '../hit'
import { toScreen, type View } from '../view'
import { drawLabels } from './labels'
import { hatch, line, spanArrow, stroke, type Palette, type Pen, type Rect } from './pen'

export interface PlanScene {
  plate: Plate
  columns: readonly ColumnPosition[]
  view: View
  frame: Frame
  palette: Palette
}

const GRID_DASH = [14, 3, 2, 3] as const

/** Line weights by zoom, px per m: slab edge, void. */
function weights(view: View) {
  const perMetre = view.scale * 1000
  return {
    edge: perMetre > 20 ? 2 : perMetre > 11 ? 1.6 : 1.2,
    void: perMetre > 20 ? 1 : 0.75,
  }
}

export function drawPlan(pen: Pen, scene: PlanScene) {
  drawSlab(pen, scene)
  drawZones(pen, scene)
  drawGridLines(pen, scene)
  drawRegions(pen, scene)
  drawVoids(pen, scene)
  drawSpans(pen, scene)
  drawOutline(pen, scene)
  drawLineLoads(pen, scene)
  drawColumns(pen, scene)
  drawLabels(pen, scene)
}

function outlinePath(pen: Pen, { plate, view }: PlanScene) {
  pen.beginPath()
  plate.outline.forEach((corner, i) => {
    const [x, y] = toScreen(view, corner)
    if (i === 0) pen.moveTo(x, y)
    else pen.lineTo(x, y)
  })
  pen.closePath()
}

function drawSlab(pen: Pen, scene: PlanScene) {
  outlinePath(pen, scene)
  pen.fillStyle = scene.palette.sheet
  pen.fill()
}

function drawOutline(pen: Pen, scene: PlanScene) {
  outlinePath(pen, scene)
  stroke(pen, scene.palette.ink, weights(scene.view).edge)
  pen.stroke()
}

function drawGridLines(pen: Pen, { plate, view, frame, palette }: PlanScene) {
  stroke(pen, palette.ghost, 0.75, GRID_DASH)
  pen.beginPath()
  for (const { at } of plate.gridX) {
    const x = along(view, 'x', at)
    pen.moveTo(x, frame.bubbles.top + frame.radius)
    pen.lineTo(x, frame.bubbles.bottom - frame.radius)
  }
  for (const { at } of plate.gridY) {
    const y = along(view, 'y', at)
    pen.moveTo(frame.bubbles.left + frame.radius, y)
    pen.lineTo(frame.bubbles.right - frame.radius, y)
  }
  pen.stroke()
  pen.setLineDash([])
}

function drawZones(pen: Pen, { plate, view, palette }: PlanScene) {
  for (const zone of plate.zones) {
    const box = screenBox(view, zone)
    stroke(pen, palette.galv, 0.5)
    hatch(pen, box, 8)
    stroke(pen, palette.galv, 1, [5, 3])
    pen.strokeRect(box.x, box.y, box.width, box.height)
  }
  for (const zone of plate.keepClear) {
    const box = screenBox(view, zone)
    pen.fillStyle = palette.sheet
    pen.fillRect(box.x, box.y, box.width, box.height)
    stroke(pen, palette.ink, 1.4, [2, 3])
    pen.strokeRect(box.x, box.y, box.width, box.height)
  }
  pen.setLineDash([])
}

function drawRegions(pen: Pen, { plate, view, palette }: PlanScene) {
  stroke(pen, palette.galv, 1.6, [10, 4])
  for (const region of plate.regions) {
    const box = screenBox(view, region)
    pen.strokeRect(box.x + 2, box.y + 2, box.width - 4, box.height - 4)
  }
  pen.setLineDash([])
}

function drawVoids(pen: Pen, { plate, view, palette }: PlanScene) {
  for (const each of plate.voids) {
    const box = screenBox(view, each)
    pen.fillStyle = palette.sheet
    pen.fillRect(box.x, box.y, box.width, box.height)
    stroke(pen, palette.ink, weights(view).void)
    line(pen, box.x, box.y, box.x + box.width, box.y + box.height)
    line(pen, box.x, box.y + box.height, box.x + box.width, box.y)
    stroke(pen, palette.ink, 1.2)
    pen.strokeRect(box.x, box.y, box.width, box.height)
  }
}

/** Slab span in each bay, free of voids and labels; none where bays are too small to read. */
function drawSpans(pen: Pen, { plate, view, palette }: PlanScene) {
  const taken = [...plate.voids, ...plate.keepClear, ...plate.zones].map(area => screenBox(view, area))
  const { span } = plate.slab
  stroke(pen, span === 'free' ? palette.ghost : palette.ink2, span === 'free' ? 0.75 : 1)
  eachBay(plate, (x0, x1, y0, y1) => {
    const width = (x1 - x0) * view.scale
    const height = (y1 - y0) * view.scale
    const least = Math.min(width, height)
    if (least < 22) return
    const [x, y] = toScreen(view, [(x0 + x1) / 2, (y0 + y1) / 2])
    if (taken.some(box => isWithin(box, x, y))) return
    const half = Math.min(span === 'free' ? 13 : 18, least * 0.28)
    if (span !== 'y') spanArrow(pen, x, y, 'x', half)
    if (span !== 'x') spanArrow(pen, x, y, 'y', half)
  })
}

function isWithin(box: Rect, x: number, y: number): boolean {
  return x >= box.x && x <= box.x + box.width && y >= box.y && y <= box.y + box.height
}

function eachBay(plate: Plate, visit: (x0: number, x1: number, y0: number, y1: number) => void) {
  const isRectangular = plate.outline.length === 4
  for (let i = 0; i + 1 < plate.gridX.length; i++) {
    for (let j = 0; j + 1 < plate.gridY.length; j++) {
      const x0 = plate.gridX[i]?.at ?? 0
      const x1 = plate.gridX[i + 1]?.at ?? 0
      const y0 = plate.gridY[j]?.at ?? 0
      const y1 = plate.gridY[j + 1]?.at ?? 0
      if (isRectangular || isInside(plate, (x0 + x1) / 2, (y0 + y1) / 2)) visit(x0, x1, y0, y1)
    }
  }
}

function isInside(plate: Plate, x: number, y: number): boolean {
  let inside = false
  plate.outline.forEach((a, i) => {
    const b = plate.outline[(i + 1) % plate.outline.length] ?? a
    if (a[0] === b[0] && a[0] > x && (a[1] > y) !== (b[1] > y)) inside = !inside
  })
  return inside
}

/** An I turned to its web; drawn larger than it is where the plan is small, so that it can be seen. */
function drawColumns(pen: Pen, { columns, view, frame, palette }: PlanScene) {
  const half = Math.min(Math.max(130 * view.scale, frame.radius < 11 ? 2.5 : 4.5), 14)
  const flange = Math.max(half * 0.34, frame.radius < 11 ? 1.2 : 1.7)
  pen.fillStyle = palette.ink
  stroke(pen, palette.ink3, 1)
  for (const column of columns) {
    const [x, y] = toScreen(view, column.at)
    if (column.isOmitted) {
      line(pen, x - half, y - half, x + half, y + half)
      line(pen, x + half, y - half, x - half, y + half)
      continue
    }
    // One path of thousands of rectangles is far slower to fill than the rectangles one by one.
    pen.fillRect(x - half, y - half, half * 2, flange)
    pen.fillRect(x - half, y + half - flange, half * 2, flange)
    pen.fillRect(x - flange / 2, y - half, flange, half * 2)
  }
}

const ARROW = 9
const ARROW_GAP = 44

function drawLineLoads(pen: Pen, scene: PlanScene) {
  const { plate, view, palette } = scene
  stroke(pen, palette.galv, 1)
  for (const { on } of plate.lineLoads) {
    if (on === 'outline') outlineArrows(pen, scene)
    else if ('void' in on) {
      const area = plate.voids.find(each => each.name === on.void)
      if (area) voidArrows(pen, screenBox(view, area))
    } else {
      const a = toScreen(view, on.from)
      const b = toScreen(view, on.to)
      stroke(pen, palette.galv, 1.6)
      line(pen, a[0], a[1], b[0], b[1])
      stroke(pen, palette.galv, 1)
      if (a[1] === b[1]) arrowsAlong(pen, 'x', Math.min(a[0], b[0]), Math.max(a[0], b[0]), a[1], -1)
      else arrowsAlong(pen, 'y', Math.min(a[1], b[1]), Math.max(a[1], b[1]), a[0], 1)
    }
  }
}

/** Small arrows that point at the line from its outer side (−1: from above or from the left). */
function arrowsAlong(pen: Pen, axis: 'x' | 'y', from: number, to: number, at: number, side: -1 | 1) {
  const count = Math.min(Math.floor((to - from) / ARROW_GAP), 400)
  if (count < 1) return
  const step = (to - from) / count
  pen.beginPath()
  for (let i = 0; i < count; i++) {
    const place = from + step * (i + 0.5)
    const point = (s: number, t: number): [number, number] => (
      axis === 'x' ? [place + s, at + side * t] : [at + side * t, place + s]
    )
    pen.moveTo(...point(0, 3 + ARROW))
    pen.lineTo(...point(0, 3))
    pen.moveTo(...point(-2.5, 6.5))
    pen.lineTo(...point(0, 3))
    pen.lineTo(...point(2.5, 6.5))
  }
  pen.stroke()
}

function outlineArrows(pen: Pen, { plate, view }: PlanScene) {
  plate.outline.forEach((corner, i) => {
    const next = plate.outline[(i + 1) % plate.outline.length] ?? corner
    const [ax, ay] = toScreen(view, corner)
    const [bx, by] = toScreen(view, next)
    const middle: [number, number] = [(corner[0] + next[0]) / 2, (corner[1] + next[1]) / 2]
    if (corner[1] === next[1]) {
      const side = isInside(plate, middle[0] + 0.5, middle[1] - 0.5) ? -1 : 1
      arrowsAlong(pen, 'x', Math.min(ax, bx), Math.max(ax, bx), ay, side)
    } else {
      const side = isInside(plate, middle[0] + 0.5, middle[1] + 0.5) ? -1 : 1
      arrowsAlong(pen, 'y', Math.min(ay, by), Math.max(ay, by), ax, side)
    }
  })
}

function voidArrows(pen: Pen, box: Rect) {
  arrowsAlong(pen, 'x', box.x, box.x + box.width, box.y, -1)
  arrowsAlong(pen, 'x', box.x, box.x + box.width, box.y + box.height, 1)
  arrowsAlong(pen, 'y', box.y, box.y + box.height, box.x, -1)
  arrowsAlong(pen, 'y', box.y, box.y + box.height, box.x + box.width, 1)
}
