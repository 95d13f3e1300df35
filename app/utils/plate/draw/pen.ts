/** Strokes that the plan, the strings and the marks have in common. All places in px. */

export const TOKENS = [
  'paper', 'sheet', 'ink', 'ink2', 'ink3', 'oxide', 'on-oxide', 'galv', 'edge', 'line', 'ghost', 'selected', 'governs',
] as const
export type Token = typeof TOKENS[number]
/** Colours in force, by token. */
export type Palette = Readonly<Record<Token, string>>

export type Pen = CanvasRenderingContext2D

const FACE = 'Manrope, "Noto Sans Math", system-ui, sans-serif'
const TICK = 4

export function setFont(pen: Pen, px: number, weight: 400 | 500 | 600 | 700 = 500) {
  pen.font = `${weight} ${px}px ${FACE}`
}

export function stroke(pen: Pen, colour: string, width: number, dash: readonly number[] = []) {
  pen.strokeStyle = colour
  pen.lineWidth = width
  pen.setLineDash([...dash])
}

export function line(pen: Pen, x1: number, y1: number, x2: number, y2: number) {
  pen.beginPath()
  pen.moveTo(x1, y1)
  pen.lineTo(x2, y2)
  pen.stroke()
}

export interface TextStyle {
  colour: string
  /** Ground behind the text, so that lines do not run through it. */
  knockOut?: string
  px?: number
  weight?: 400 | 500 | 600 | 700
  align?: CanvasTextAlign
  /** Turned to read from the right, as on the left-hand string. */
  turned?: boolean
}

/** One line of text with its middle at the given place. */
export function text(pen: Pen, words: string, x: number, y: number, style: TextStyle) {
  const { px = 11, weight = 500, align = 'center' } = style
  pen.save()
  pen.translate(x, y)
  if (style.turned) pen.rotate(-Math.PI / 2)
  setFont(pen, px, weight)
  pen.textAlign = align
  pen.textBaseline = 'middle'
  if (style.knockOut) {
    const width = pen.measureText(words).width
    const left = align === 'center' ? -width / 2 : align === 'right' ? -width : 0
    pen.fillStyle = style.knockOut
    pen.fillRect(left - 3, -px / 2 - 2, width + 6, px + 4)
  }
  pen.fillStyle = style.colour
  pen.fillText(words, 0, 0.5)
  pen.restore()
}

export function textWidth(pen: Pen, words: string, px = 11, weight: 400 | 500 | 600 | 700 = 500): number {
  setFont(pen, px, weight)
  return pen.measureText(words).width
}

export function bubble(pen: Pen, x: number, y: number, radius: number, label: string, colours: { line: string, ground: string }, width = 1.2) {
  pen.beginPath()
  pen.arc(x, y, radius, 0, Math.PI * 2)
  pen.fillStyle = colours.ground
  pen.fill()
  stroke(pen, colours.line, radius < 9 ? 1 : width)
  pen.stroke()
  const px = radius < 9 || label.length > 2 ? 9 : 11
  text(pen, label, x, y, { colour: colours.line, px, weight: 600 })
}

/** 45° tick of a dimension string. */
export function tick(pen: Pen, x: number, y: number) {
  line(pen, x - TICK, y + TICK, x + TICK, y - TICK)
}

/** A line with half a barb at both ends: the direction in which the slab spans. */
export function spanArrow(pen: Pen, x: number, y: number, axis: 'x' | 'y', half: number) {
  const barb = Math.min(7, half * 0.45)
  pen.beginPath()
  if (axis === 'x') {
    pen.moveTo(x - half + barb, y - barb * 0.6)
    pen.lineTo(x - half, y)
    pen.lineTo(x + half, y)
    pen.lineTo(x + half - barb, y + barb * 0.6)
  } else {
    pen.moveTo(x + barb * 0.6, y - half + barb)
    pen.lineTo(x, y - half)
    pen.lineTo(x, y + half)
    pen.lineTo(x - barb * 0.6, y + half - barb)
  }
  pen.stroke()
}

export interface Rect { x: number, y: number, width: number, height: number }

/** 45° lines within a rectangle, `gap` px apart. */
export function hatch(pen: Pen, box: Rect, gap: number) {
  pen.save()
  pen.beginPath()
  pen.rect(box.x, box.y, box.width, box.height)
  pen.clip()
  pen.beginPath()
  const reach = Math.min(box.width + box.height, 8000)
  for (let s = 0; s <= reach; s += gap) {
    pen.moveTo(box.x + s, box.y)
    pen.lineTo(box.x + s - box.height, box.y + box.height)
  }
  pen.stroke()
  pen.restore()
}
