/** The view onto the plate: screen = origin + world × scale, y turned so that north is up. */
import type { Box, Point } from './outline'

export interface View {
  /** px per mm */
  scale: number
  /** Screen place of the world's origin, px. */
  x: number
  y: number
}

export interface Size { width: number, height: number }

/** Narrower drawings pan and pinch; strings stand closer and editing is left to the table. */
export const NARROW = 600

/** Room round the plate for bubbles and dimension strings, px. */
export const MARGIN = { top: 130, right: 84, bottom: 108, left: 142 } as const
const NARROW_MARGIN = { top: 96, right: 46, bottom: 100, left: 92 } as const
const LEAST_SCALE = 0.0004
const MOST_SCALE = 0.5

export function toScreen(view: View, [x, y]: Point): [number, number] {
  return [view.x + x * view.scale, view.y - y * view.scale]
}

export function toWorld(view: View, [x, y]: Point): [number, number] {
  return [(x - view.x) / view.scale, (view.y - y) / view.scale]
}

/** The view that shows the whole plate with its strings, centred. */
export function fitView(bounds: Box, size: Size): View {
  const margin = size.width < NARROW ? NARROW_MARGIN : MARGIN
  const width = Math.max(size.width - margin.left - margin.right, 60)
  const height = Math.max(size.height - margin.top - margin.bottom, 60)
  const scale = Math.min(
    Math.max(Math.min(width / Math.max(bounds.width, 1), height / Math.max(bounds.height, 1)), LEAST_SCALE),
    MOST_SCALE,
  )
  const spareX = width - bounds.width * scale
  const spareY = height - bounds.height * scale
  return {
    scale,
    x: margin.left + spareX / 2 - bounds.x * scale,
    y: margin.top + spareY / 2 + (bounds.y + bounds.height) * scale,
  }
}

/** Zoom by a factor with one screen point kept where it is. */
export function zoomAt(view: View, [x, y]: Point, factor: number): View {
  const scale = Math.min(Math.max(view.scale * factor, LEAST_SCALE), MOST_SCALE)
  const by = scale / view.scale
  return { scale, x: x - (x - view.x) * by, y: y - (y - view.y) * by }
}

export function panBy(view: View, dx: number, dy: number): View {
  return { ...view, x: view.x + dx, y: view.y + dy }
}

/** Length of the scale bar in metres: 1, 2 or 5 × a power of ten, about 140 px at most. */
export function scaleBarMetres(view: View, most = 150): number {
  const metres = most / (view.scale * 1000)
  const power = 10 ** Math.floor(Math.log10(metres))
  const lead = metres / power
  return (lead >= 5 ? 5 : lead >= 2 ? 2 : 1) * power
}
