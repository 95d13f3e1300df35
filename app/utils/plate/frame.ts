/** Where bubbles and dimension strings stand round the plate, in px. Drawing and pointer share it. */
import type { Plate } from '#shared/schemas/plate'
import { boundsOf, type Axis, type Box } from './outline'
import { NARROW, toScreen, type Size, type View } from './view'

export interface Frame {
  left: number
  right: number
  top: number
  bottom: number
  /** Centre lines of the strips above and at the left: bubbles, overall string, bay string. */
  bubbles: { top: number, bottom: number, left: number, right: number }
  overall: { top: number, left: number }
  bays: { top: number, left: number }
  radius: number
  /** True where a strip was pushed in from outside the window and covers the plan. */
  covers: { top: boolean, bottom: boolean, left: boolean, right: boolean }
}

const WIDE_OFF = { bubble: 103, overall: 70, bays: 45, far: 41 } as const
const NARROW_OFF = { bubble: 72, overall: 48, bays: 26, far: 26 } as const
const RIM = 20

/** Smallest rectangle round outline and grid lines, mm. */
export function extentOf(plate: Plate): Box {
  const ends: [number, number][] = [
    [plate.gridX[0]?.at ?? 0, plate.gridY[0]?.at ?? 0],
    [plate.gridX.at(-1)?.at ?? 0, plate.gridY.at(-1)?.at ?? 0],
  ]
  return boundsOf([...plate.outline, ...ends])
}

export function frameOf(plate: Plate, view: View, size: Size): Frame {
  const off = size.width < NARROW ? NARROW_OFF : WIDE_OFF
  const extent = extentOf(plate)
  const [left, bottom] = toScreen(view, [extent.x, extent.y])
  const [right, top] = toScreen(view, [extent.x + extent.width, extent.y + extent.height])
  const bubbleTop = Math.max(top - off.bubble, RIM)
  const bubbleLeft = Math.max(left - off.bubble, RIM)
  const bubbleBottom = Math.min(bottom + off.far, size.height - RIM)
  const bubbleRight = Math.min(right + off.far, size.width - RIM)
  return {
    left, right, top, bottom,
    bubbles: { top: bubbleTop, left: bubbleLeft, bottom: bubbleBottom, right: bubbleRight },
    overall: { top: bubbleTop + off.bubble - off.overall, left: bubbleLeft + off.bubble - off.overall },
    bays: { top: bubbleTop + off.bubble - off.bays, left: bubbleLeft + off.bubble - off.bays },
    radius: bubbleRadius(plate, view),
    covers: {
      top: bubbleTop > top - off.bubble, left: bubbleLeft > left - off.bubble,
      bottom: bubbleBottom < bottom + off.far, right: bubbleRight < right + off.far,
    },
  }
}

/** 11 px, less where lines stand closer than the bubbles are wide. */
function bubbleRadius(plate: Plate, view: View): number {
  let least = Infinity
  for (const lines of [plate.gridX, plate.gridY]) {
    for (let i = 1; i < lines.length; i++) {
      least = Math.min(least, ((lines[i]?.at ?? 0) - (lines[i - 1]?.at ?? 0)) * view.scale)
    }
  }
  return Math.min(11, Math.max(7, (least - 2) / 2))
}

/** Screen place of a coordinate along its axis. */
export function along(view: View, axis: Axis, at: number): number {
  return axis === 'x' ? view.x + at * view.scale : view.y - at * view.scale
}
