/** Bubbles at both ends, dimension strings (bays, then overall), north, scale bar. */
import { formatNumber } from '#shared/utils/format'
import { along } from '../frame'
import { gridOf } from '../grid'
import type { Axis } from '../outline'
import type { Selection } from '../selection'
import { scaleBarMetres, type Size } from '../view'
import { bubble, line, stroke, text, textWidth, tick, type Pen } from './pen'
import type { PlanScene } from './plan'

export interface StringScene extends PlanScene {
  size: Size
  selection: Selection | null
  /** Bay whose figure is being typed over: its text is left out. */
  edited: { axis: Axis, bay: number | null } | null
}

export function drawStrings(pen: Pen, scene: StringScene) {
  drawBands(pen, scene)
  drawString(pen, scene, 'x')
  drawString(pen, scene, 'y')
  drawBubbles(pen, scene, 'x')
  drawBubbles(pen, scene, 'y')
  drawFurniture(pen, scene)
}

/** Ground behind strips that were pushed in over the plan. */
function drawBands(pen: Pen, { frame, palette, size }: StringScene) {
  pen.fillStyle = palette.sheet
  if (frame.covers.top) pen.fillRect(0, 0, size.width, frame.bays.top + 8)
  if (frame.covers.left) pen.fillRect(0, 0, frame.bays.left + 8, size.height)
  if (frame.covers.bottom) pen.fillRect(0, frame.bubbles.bottom - 14, size.width, size.height)
  if (frame.covers.right) pen.fillRect(frame.bubbles.right - 14, 0, size.width, size.height)
}

/** Lines whose strings and bubbles are in sight: those beside the strips of the other axis. */
function inSight({ frame, size }: StringScene, axis: Axis, place: number): boolean {
  return axis === 'x'
    ? place >= (frame.covers.left ? frame.bays.left + 8 : 0) && place <= size.width
    : place >= (frame.covers.top ? frame.bays.top + 8 : 0) && place <= size.height
}

function isSelectedLine(selection: Selection | null, axis: Axis, index: number): boolean {
  return selection?.kind === 'line' && selection.axis === axis && selection.index === index
}

function drawBubbles(pen: Pen, scene: StringScene, axis: Axis) {
  const { plate, view, frame, palette, selection } = scene
  let last = -Infinity
  gridOf(plate, axis).forEach(({ label, at, pinned }, index) => {
    const place = along(view, axis, at)
    if (!inSight(scene, axis, place)) return
    const isSelected = isSelectedLine(selection, axis, index)
    if (Math.abs(place - last) < frame.radius * 2 && !isSelected) return
    last = place
    const colours = { line: isSelected ? palette.oxide : palette.ink, ground: palette.sheet }
    const ends: [number, number][] = axis === 'x'
      ? [[place, frame.bubbles.top], [place, frame.bubbles.bottom]]
      : [[frame.bubbles.left, place], [frame.bubbles.right, place]]
    for (const [x, y] of ends) {
      bubble(pen, x, y, frame.radius, label, colours, isSelected ? 2 : 1.2)
      if (pinned) {
        stroke(pen, colours.line, 1)
        pen.beginPath()
        pen.arc(x, y, frame.radius + 2.5, 0, Math.PI * 2)
        pen.stroke()
      }
    }
  })
}

function drawString(pen: Pen, scene: StringScene, axis: Axis) {
  const { plate, view, frame, palette, selection, edited } = scene
  const places = gridOf(plate, axis).map(each => along(view, axis, each.at))
  const first = places[0] ?? 0
  const last = places.at(-1) ?? 0
  const bays = axis === 'x' ? frame.bays.top : frame.bays.left
  const overall = axis === 'x' ? frame.overall.top : frame.overall.left
  const draw = (from: number, to: number, at: number) => (
    axis === 'x' ? line(pen, from, at, to, at) : line(pen, at, from, at, to)
  )
  const mark = (place: number, at: number) => (axis === 'x' ? tick(pen, place, at) : tick(pen, at, place))
  stroke(pen, palette.ink3, 0.75)
  draw(first, last, bays)
  draw(first, last, overall)
  stroke(pen, palette.ink, 1.2)
  for (const place of places) mark(place, bays)
  for (const place of [first, last]) mark(place, overall)

  const put = (words: string, middle: number, at: number, colour: string, px: number) => {
    const [x, y] = axis === 'x' ? [middle, at - 9] : [at - 9, middle]
    text(pen, words, x, y, { colour, px, turned: axis === 'y' })
  }
  gridOf(plate, axis).slice(1).forEach(({ at }, bay) => {
    const from = places[bay] ?? 0
    const to = places[bay + 1] ?? 0
    const middle = (from + to) / 2
    if (!inSight(scene, axis, middle) || (edited?.axis === axis && edited.bay === bay)) return
    const words = formatNumber(at - (gridOf(plate, axis)[bay]?.at ?? 0))
    const room = Math.abs(to - from) - 6
    const px = textWidth(pen, words, 11) <= room ? 11 : 9
    if (textWidth(pen, words, px) > room) return
    const isSelected = selection?.kind === 'bay' && selection[axis] === bay
    put(words, middle, bays, isSelected ? palette.oxide : palette.ink, px)
  })
  if (edited?.axis === axis && edited.bay === null) return
  const total = (gridOf(plate, axis).at(-1)?.at ?? 0) - (gridOf(plate, axis)[0]?.at ?? 0)
  put(formatNumber(total), (first + last) / 2, overall, palette.ink, 11)
}

function drawFurniture(pen: Pen, scene: StringScene) {
  const { size, frame } = scene
  drawNorth(pen, scene, size.width - 40, size.height - 46)
  drawScaleBar(pen, scene, Math.min(Math.max(frame.left, 24), size.width / 2), size.height - 26)
}

function drawScaleBar(pen: Pen, { view, palette, size, frame }: StringScene, left: number, y: number) {
  const metres = scaleBarMetres(view)
  const length = metres * 1000 * view.scale
  pen.fillStyle = palette.sheet
  pen.fillRect(left - 8, y - 18, length + 40, 28)
  stroke(pen, palette.ink, 1)
  pen.strokeRect(left, y, length, 4)
  pen.fillStyle = palette.ink
  pen.fillRect(left, y, length / 2, 4)
  const put = (words: string, x: number) => text(pen, words, x, y - 9, { colour: palette.ink2 })
  put('0', left)
  put(formatNumber(metres / 2, metres < 2 ? 1 : metres % 2 === 0 ? 0 : 1), left + length / 2)
  put(`${formatNumber(metres)}\u00A0m`, left + length)
  if (size.width > 700 && !frame.covers.bottom) {
    text(pen, 'Dimensions in mm', size.width - 212, y, { colour: palette.ink3, align: 'right', knockOut: palette.sheet })
  }
}

function drawNorth(pen: Pen, { palette }: StringScene, x: number, y: number) {
  const radius = 13
  pen.beginPath()
  pen.arc(x, y, radius, 0, Math.PI * 2)
  pen.fillStyle = palette.sheet
  pen.fill()
  stroke(pen, palette.ink, 1)
  pen.stroke()
  for (const side of [-1, 1]) {
    pen.beginPath()
    pen.moveTo(x, y - radius + 1)
    pen.lineTo(x + side * 5, y + 9)
    pen.lineTo(x, y + 5)
    pen.closePath()
    if (side > 0) {
      pen.fillStyle = palette.ink
      pen.fill()
    }
    pen.stroke()
  }
  text(pen, 'N', x, y - radius - 9, { colour: palette.ink, weight: 700 })
}
