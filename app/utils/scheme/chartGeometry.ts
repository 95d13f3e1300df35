/** Pure geometry of the chart of steel against structural depth. */

export interface ChartPoint {
  key: string
  number: number
  /** kg/m² */
  massPerArea: number
  /** Structural depth, or the deepest beam where slabs differ; mm. */
  depth: number
  /** Index of the slab system. */
  slab: number
  /** Cap under which the sizes were chosen, mm. */
  depthCap: number | null
  onTradeOffLine: boolean
}

export interface Frame { left: number, right: number, top: number, bottom: number }

/** Rounds a domain outward to a step, with at least one step of height. */
export function niceDomain(low: number, high: number, step: number): [number, number] {
  const from = Math.floor(low / step) * step
  const to = Math.ceil(high / step) * step
  return [from, to > from ? to : from + step]
}

/** A step of 1, 2 or 5 times a power of ten that cuts a length into about `parts`. */
export function niceStep(length: number, parts: number): number {
  if (!(length > 0)) return 1
  const raw = length / parts
  const power = 10 ** Math.floor(Math.log10(raw))
  const share = raw / power
  const factor = share <= 1 ? 1 : share <= 2 ? 2 : share <= 5 ? 5 : 10
  return factor * power
}

export function ticksOf(domain: readonly [number, number], step: number): number[] {
  const ticks: number[] = []
  if (!(step > 0) || !Number.isFinite(domain[0]) || !Number.isFinite(domain[1])) return ticks
  const first = Math.ceil(domain[0] / step - 1e-9)
  for (let i = first; i * step <= domain[1] + step * 1e-9; i += 1) ticks.push(Number((i * step).toPrecision(12)))
  return ticks
}

/** The points of the trade-off line by rising depth; of equal depths the lightest first. */
export function tradeOffPoints(points: readonly ChartPoint[]): ChartPoint[] {
  return points.filter(point => point.onTradeOffLine)
    .sort((a, b) => a.depth - b.depth || a.massPerArea - b.massPerArea)
}

/**
 * The line as steps in pixels: from the top edge down to the shallowest scheme, right to the depth
 * of the next, down to its mass, at last to the right edge. Between two steps no scheme is lighter.
 */
export function stepPath(
  line: readonly { depth: number, massPerArea: number }[],
  x: (depth: number) => number, y: (mass: number) => number, frame: Frame,
): string {
  const first = line[0]
  if (!first) return ''
  const parts = [`M${round(x(first.depth))} ${frame.top}V${round(y(first.massPerArea))}`]
  for (const point of line.slice(1)) parts.push(`H${round(x(point.depth))}V${round(y(point.massPerArea))}`)
  parts.push(`H${frame.right}`)
  return parts.join('')
}

/** All points as one path of dots: a stroke with round caps draws each. */
export function dotsPath(
  points: readonly ChartPoint[], x: (depth: number) => number, y: (mass: number) => number,
): string {
  return points.map(point => `M${round(x(point.depth))} ${round(y(point.massPerArea))}h0`).join('')
}

/** Points as open rings or squares of 4 px in one path. */
export function marksPath(
  points: readonly ChartPoint[], x: (depth: number) => number, y: (mass: number) => number, mark: 'ring' | 'square',
): string {
  const shape = mark === 'ring' ? 'a2 2 0 1 0 4 0a2 2 0 1 0 -4 0' : 'm0 -2h4v4h-4z'
  return points.map(point => `M${round(x(point.depth) - 2)} ${round(y(point.massPerArea))}${shape}`).join('')
}

/** The point nearest to a place on the screen, within `reach` pixels; trade-off points win ties. */
export function nearestPoint(
  points: readonly ChartPoint[], at: { x: number, y: number },
  x: (depth: number) => number, y: (mass: number) => number, reach = 16,
): ChartPoint | null {
  let best: ChartPoint | null = null
  let least = reach * reach
  for (const point of points) {
    const dx = x(point.depth) - at.x
    const dy = y(point.massPerArea) - at.y
    const distance = dx * dx + dy * dy - (point.onTradeOffLine ? 1 : 0)
    if (distance < least) {
      least = distance
      best = point
    }
  }
  return best
}

/** The next point of the trade-off line in a direction from the selected one; the lightest at first. */
export function stepAlong(line: readonly ChartPoint[], selected: string | null, step: 1 | -1): ChartPoint | null {
  if (line.length === 0) return null
  const at = line.findIndex(point => point.key === selected)
  if (at < 0) return line.at(-1) ?? null
  return line[Math.min(line.length - 1, Math.max(0, at + step))] ?? null
}

/** The curve of the lightest found so far, as steps from the first arrangement to the last examined. */
export function historyPath(
  history: readonly { examined: number, massPerArea: number }[], examined: number,
  x: (examined: number) => number, y: (mass: number) => number,
): string {
  const first = history[0]
  if (!first) return ''
  const parts = [`M${round(x(first.examined))} ${round(y(first.massPerArea))}`]
  for (const point of history.slice(1)) parts.push(`H${round(x(point.examined))}V${round(y(point.massPerArea))}`)
  parts.push(`H${round(x(examined))}`)
  return parts.join('')
}

function round(value: number): number {
  return Math.round(value * 10) / 10
}
