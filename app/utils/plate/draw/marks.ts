/** What is selected, dragged or at fault, over the plan. */
import { formatNumber } from '#shared/utils/format'
import type { Plate } from '#shared/schemas/plate'
import { along } from '../frame'
import { gridOf } from '../grid'
import { handlesOf, screenBox } from '../hit'
import type { Axis, Box, Point } from '../outline'
import { bayName, type Selection } from '../selection'
import { toScreen } from '../view'
import { line, spanArrow, stroke, text, type Pen, type Rect } from './pen'
import { loadText } from './labels'
import type { PlanScene } from './plan'

/** What a tool shows before the pointer is let go. */
export type Preview
  = | { kind: 'new-line', axis: Axis, at: number }
    | { kind: 'new-area', box: Box }
    | { kind: 'new-load', from: Point, to: Point }
    | { kind: 'distance', from: Point, to: Point }

export interface MarkScene extends PlanScene {
  selection: Selection | null
  hover: Selection | null
  preview: Preview | null
  /** True while the selection is dragged: its distances stand beside it. */
  isDragged: boolean
  faults: readonly Point[]
}

export function drawMarks(pen: Pen, scene: MarkScene) {
  pen.save()
  clipToPlan(pen, scene)
  if (scene.hover && !scene.isDragged) drawHover(pen, scene, scene.hover)
  if (scene.selection) drawSelection(pen, scene, scene.selection)
  if (scene.preview) drawPreview(pen, scene, scene.preview)
  drawFaults(pen, scene)
  pen.restore()
}

/** Strips that were pushed in over the plan stay clear of marks. */
function clipToPlan(pen: Pen, { frame }: MarkScene) {
  const FAR = 100_000
  const left = frame.covers.left ? frame.bays.left + 8 : -FAR
  const top = frame.covers.top ? frame.bays.top + 8 : -FAR
  const right = frame.covers.right ? frame.bubbles.right - 14 : FAR
  const bottom = frame.covers.bottom ? frame.bubbles.bottom - 14 : FAR
  pen.beginPath()
  pen.rect(left, top, Math.max(right - left, 0), Math.max(bottom - top, 0))
  pen.clip()
}

function lineEnds({ view, frame }: PlanScene, axis: Axis, at: number): [number, number, number, number] {
  const place = along(view, axis, at)
  return axis === 'x'
    ? [place, frame.bubbles.top + frame.radius, place, frame.bubbles.bottom - frame.radius]
    : [frame.bubbles.left + frame.radius, place, frame.bubbles.right - frame.radius, place]
}

function drawHover(pen: Pen, scene: MarkScene, hover: Selection) {
  const { plate, view, palette } = scene
  stroke(pen, palette.oxide, 1)
  if (hover.kind === 'line') {
    const at = gridOf(plate, hover.axis)[hover.index]?.at
    if (at !== undefined) line(pen, ...lineEnds(scene, hover.axis, at))
  } else if (hover.kind === 'area') {
    const area = plate[hover.area][hover.index]
    if (area) outlineBox(pen, screenBox(view, area))
  } else if (hover.kind === 'column') ring(pen, scene, hover.x, hover.y, 10)
}

function outlineBox(pen: Pen, box: Rect) {
  pen.strokeRect(box.x, box.y, box.width, box.height)
}

function ring(pen: Pen, { plate, view }: PlanScene, x: number, y: number, radius: number) {
  const at = toScreen(view, [plate.gridX[x]?.at ?? 0, plate.gridY[y]?.at ?? 0])
  pen.beginPath()
  pen.arc(at[0], at[1], radius, 0, Math.PI * 2)
  pen.stroke()
}

function drawSelection(pen: Pen, scene: MarkScene, selection: Selection) {
  const { plate, view, palette } = scene
  switch (selection.kind) {
    case 'line': return drawLine(pen, scene, selection.axis, selection.index)
    case 'bay': return drawBay(pen, scene, selection.x, selection.y)
    case 'column':
      stroke(pen, palette.oxide, 2)
      return ring(pen, scene, selection.x, selection.y, 12)
    case 'area': {
      const area = plate[selection.area][selection.index]
      return area ? drawArea(pen, scene, area) : undefined
    }
    case 'edge': {
      const a = plate.outline[selection.index]
      const b = plate.outline[(selection.index + 1) % plate.outline.length]
      if (!a || !b) return
      stroke(pen, palette.oxide, 3)
      return line(pen, ...toScreen(view, a), ...toScreen(view, b))
    }
    case 'lineLoad': return drawLineLoad(pen, scene, selection.index)
  }
}

function drawLineLoad(pen: Pen, { plate, view, palette }: MarkScene, index: number) {
  const on = plate.lineLoads[index]?.on
  if (!on || typeof on === 'string' || !('from' in on)) return
  stroke(pen, palette.oxide, 3)
  line(pen, ...toScreen(view, on.from), ...toScreen(view, on.to))
}

function drawLine(pen: Pen, scene: MarkScene, axis: Axis, index: number) {
  const { plate, palette, isDragged } = scene
  const lines = gridOf(plate, axis)
  const at = lines[index]?.at
  if (at === undefined) return
  stroke(pen, palette.oxide, 1.6)
  line(pen, ...lineEnds(scene, axis, at))
  if (!isDragged) return
  for (const other of [lines[index - 1], lines[index + 1]]) {
    if (other) distance(pen, scene, axis, other.at, at)
  }
}

/** Distance between two lines while one of them is dragged, beside the plan's middle. */
function distance(pen: Pen, { view, frame, palette }: MarkScene, axis: Axis, from: number, to: number) {
  const a = along(view, axis, from)
  const b = along(view, axis, to)
  const across = axis === 'x' ? (frame.top + frame.bottom) / 2 : (frame.left + frame.right) / 2
  stroke(pen, palette.oxide, 1)
  if (axis === 'x') line(pen, a, across, b, across)
  else line(pen, across, a, across, b)
  const [x, y] = axis === 'x' ? [(a + b) / 2, across] : [across, (a + b) / 2]
  text(pen, `${formatNumber(Math.abs(to - from))}\u00A0mm`, x, y, {
    colour: palette.oxide, knockOut: palette.sheet, weight: 700, px: 12,
  })
}

function drawBay(pen: Pen, scene: MarkScene, i: number, j: number) {
  const { plate, view, palette } = scene
  const box = bayBox(plate, i, j)
  if (!box) return
  const screen = screenBox(view, box)
  pen.save()
  pen.globalAlpha = 0.1
  pen.fillStyle = palette.oxide
  pen.fillRect(screen.x, screen.y, screen.width, screen.height)
  pen.restore()
  stroke(pen, palette.oxide, 2)
  outlineBox(pen, screen)
  const x = screen.x + screen.width / 2
  const y = screen.y + screen.height / 2
  const isRoomy = screen.width > 96 && screen.height > 76
  if (!isRoomy || plate.voids.some(each => isOver(screenBox(view, each), x, y))) return
  if ([...plate.zones, ...plate.keepClear].some(each => isOver(screenBox(view, each), x, y))) return
  const { permanent, variable } = plate.floorLoad
  text(pen, `Bay ${bayName(plate, i, j)}`, x, y - 24, { colour: palette.oxide, weight: 700 })
  text(pen, `${loadText(permanent)} + ${loadText(variable)}\u00A0kN/m²`, x, y + 24, { colour: palette.oxide })
  stroke(pen, palette.oxide, 1.2)
  const { span } = plate.slab
  if (span !== 'y') spanArrow(pen, x, y, 'x', span === 'free' ? 13 : 18)
  if (span !== 'x') spanArrow(pen, x, y, 'y', span === 'free' ? 13 : 18)
}

function isOver(box: Rect, x: number, y: number): boolean {
  return x >= box.x - 40 && x <= box.x + box.width + 40 && y >= box.y - 20 && y <= box.y + box.height + 20
}

/** A bay as a rectangle of the plate, mm. */
export function bayBox(plate: Plate, i: number, j: number): Box | null {
  const x0 = plate.gridX[i]?.at
  const x1 = plate.gridX[i + 1]?.at
  const y0 = plate.gridY[j]?.at
  const y1 = plate.gridY[j + 1]?.at
  if (x0 === undefined || x1 === undefined || y0 === undefined || y1 === undefined) return null
  return { x: x0, y: y0, width: x1 - x0, height: y1 - y0 }
}

function drawArea(pen: Pen, scene: MarkScene, area: Box) {
  const { view, palette, isDragged } = scene
  const box = screenBox(view, area)
  stroke(pen, palette.oxide, 2)
  outlineBox(pen, box)
  for (const { at: [x, y] } of handlesOf(box)) {
    pen.fillStyle = palette.sheet
    pen.fillRect(x - 3.5, y - 3.5, 7, 7)
    stroke(pen, palette.oxide, 1.4)
    pen.strokeRect(x - 3.5, y - 3.5, 7, 7)
  }
  if (isDragged) areaFigures(pen, scene, area)
}

/** Size, and distance to the grid lines at the left and below, while an area is drawn or dragged. */
function areaFigures(pen: Pen, { plate, view, palette }: MarkScene, area: Box) {
  const box = screenBox(view, area)
  const style = { colour: palette.oxide, knockOut: palette.sheet, weight: 700, px: 12 } as const
  text(pen, `${formatNumber(area.width)}\u00A0mm`, box.x + box.width / 2, box.y - 10, style)
  text(pen, `${formatNumber(area.height)}\u00A0mm`, box.x + box.width + 12, box.y + box.height / 2, { ...style, turned: true })
  for (const axis of ['x', 'y'] as const) {
    const before = gridOf(plate, axis).filter(each => each.at <= area[axis]).at(-1)
    if (!before || before.at === area[axis]) continue
    const a = along(view, axis, before.at)
    const b = along(view, axis, area[axis])
    const words = `${formatNumber(area[axis] - before.at)} from ${before.label}`
    stroke(pen, palette.oxide, 1)
    if (axis === 'x') {
      const y = box.y + box.height + 12
      line(pen, a, y, b, y)
      text(pen, words, (a + b) / 2, y + 11, { ...style, px: 11, weight: 500 })
    } else {
      const x = box.x - 12
      line(pen, x, a, x, b)
      text(pen, words, x - 11, (a + b) / 2, { ...style, px: 11, weight: 500, turned: true })
    }
  }
}

function drawPreview(pen: Pen, scene: MarkScene, preview: Preview) {
  const { plate, view, palette } = scene
  switch (preview.kind) {
    case 'new-line': {
      stroke(pen, palette.oxide, 1.2, [6, 3])
      line(pen, ...lineEnds(scene, preview.axis, preview.at))
      pen.setLineDash([])
      const lines = gridOf(plate, preview.axis)
      const before = lines.filter(each => each.at < preview.at).at(-1)
      const after = lines.find(each => each.at > preview.at)
      for (const other of [before, after]) if (other) distance(pen, scene, preview.axis, other.at, preview.at)
      return
    }
    case 'new-area': {
      stroke(pen, palette.oxide, 1.4, [6, 3])
      outlineBox(pen, screenBox(view, preview.box))
      pen.setLineDash([])
      return areaFigures(pen, scene, preview.box)
    }
    case 'new-load':
    case 'distance': {
      const a = toScreen(view, preview.from)
      const b = toScreen(view, preview.to)
      stroke(pen, palette.oxide, 1.4, preview.kind === 'new-load' ? [] : [6, 3])
      line(pen, ...a, ...b)
      pen.setLineDash([])
      const length = Math.hypot(preview.to[0] - preview.from[0], preview.to[1] - preview.from[1])
      return text(pen, `${formatNumber(length)}\u00A0mm`, (a[0] + b[0]) / 2, (a[1] + b[1]) / 2 - 12, {
        colour: palette.oxide, knockOut: palette.sheet, weight: 700, px: 12,
      })
    }
  }
}

function drawFaults(pen: Pen, { view, palette, faults }: MarkScene) {
  stroke(pen, palette.oxide, 2)
  for (const fault of faults) {
    const [x, y] = toScreen(view, fault)
    pen.beginPath()
    pen.arc(x, y, 12, 0, Math.PI * 2)
    pen.stroke()
  }
}
