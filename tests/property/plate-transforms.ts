/** A plate moved, mirrored or turned over its diagonal: nothing that an engineer would call another plate. */
import type { Plate } from '#shared/schemas/plate'

interface Box { x: number, y: number, width: number, height: number }
type Point = [number, number]

interface Move {
  /** Whether x and y change places. */
  transposes: boolean
  point: (p: Point) => Point
}

const moved = (move: Move) => (plate: Plate): Plate => {
  const box = <B extends Box>(b: B): B => {
    const [ax, ay] = move.point([b.x, b.y])
    const [bx, by] = move.point([b.x + b.width, b.y + b.height])
    return { ...b, x: Math.min(ax, bx), y: Math.min(ay, by), width: Math.abs(bx - ax), height: Math.abs(by - ay) }
  }
  const [gridX, gridY] = move.transposes ? [plate.gridY, plate.gridX] : [plate.gridX, plate.gridY]
  const turnedLine = (line: 'x' | 'y') => move.transposes ? (line === 'x' ? 'y' : 'x') : line
  const lines = (list: Plate['gridX'], k: 0 | 1) => list
    .map(line => ({ ...line, at: move.point((k === 0) === move.transposes ? [0, line.at] : [line.at, 0])[k] }))
    .sort((a, b) => a.at - b.at)
  const spanned = (slab: Plate['slab']): Plate['slab'] => slab.span === 'free' ? slab : { ...slab, span: turnedLine(slab.span) }
  return {
    ...plate,
    gridX: lines(gridX, 0),
    gridY: lines(gridY, 1),
    outline: plate.outline.map(move.point),
    voids: plate.voids.map(box),
    zones: plate.zones.map(zone => ({ ...box(zone), ...(zone.slab && { slab: spanned(zone.slab) }) })),
    keepClear: plate.keepClear.map(box),
    regions: plate.regions.map(box),
    slab: spanned(plate.slab),
    omittedColumns: plate.omittedColumns.map(({ x, y, line }) => move.transposes ? { x: y, y: x, line: turnedLine(line) } : { x, y, line }),
    lineLoads: plate.lineLoads.map(line => typeof line.on === 'object' && 'from' in line.on
      ? { ...line, on: { from: move.point(line.on.from), to: move.point(line.on.to) } }
      : line),
  }
}

export interface Transform { name: string, transposes: boolean, point: (p: Point) => Point, apply: (plate: Plate) => Plate }

function transform(name: string, transposes: boolean, point: (p: Point) => Point): Transform {
  return { name, transposes, point, apply: moved({ transposes, point }) }
}

export const TRANSFORMS: Transform[] = [
  transform('translated', false, ([x, y]) => [x + 12_345, y - 6789]),
  transform('mirrored along x', false, ([x, y]) => [0 - x, y]),
  transform('mirrored along y', false, ([x, y]) => [x, 0 - y]),
  transform('transposed', true, ([x, y]) => [y, x]),
  { name: 'outline drawn the other way round', transposes: false, point: p => p, apply: plate => ({ ...plate, outline: [...plate.outline].reverse() }) },
  { name: 'lists in the other order', transposes: false, point: p => p, apply: reversedLists },
  { name: 'with grid lines off the plate', transposes: false, point: p => p, apply: withLinesOutside },
]

function reversedLists(plate: Plate): Plate {
  return {
    ...plate,
    voids: [...plate.voids].reverse(), zones: [...plate.zones].reverse(), lineLoads: [...plate.lineLoads].reverse(),
    omittedColumns: [...plate.omittedColumns].reverse(), keepClear: [...plate.keepClear].reverse(),
    outline: [...plate.outline.slice(3), ...plate.outline.slice(0, 3)],
  }
}

/** Beyond any overhang, so that no bay between them and the plate is full. */
function withLinesOutside(plate: Plate): Plate {
  const outside = (lines: Plate['gridX'], names: [string, string]) => [
    { label: names[0], at: lines[0]!.at - 2500, pinned: false }, ...lines, { label: names[1], at: lines[lines.length - 1]!.at + 3100, pinned: false },
  ]
  return { ...plate, gridX: outside(plate.gridX, ['0', '99']), gridY: outside(plate.gridY, ['AA', 'ZZ']) }
}
