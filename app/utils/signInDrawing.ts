/**
 * The floor drawn on the sign-in sheet: invented, 54 × 36 m with two cores. Geometry only, in pixels
 * of the drawing (16.6 to the metre), y downwards.
 */
const SCALE = 16.6 / 1000
const LEFT = 138
const TOP = 126

const BAYS_X = [9000, 9000, 9000, 9000, 9000, 9000]
const BAYS_Y = [7500, 7500, 6000, 7500, 7500]
const CORES = [
  { x: 11_000, y: 15_500, width: 6000, height: 5000 },
  { x: 38_000, y: 15_500, width: 5000, height: 5000 },
]
/** Sizes by line of primary beams, from A up; those beside a core are lighter. */
const SIZES = ['457×191×74', '533×210×109', '533×210×92', '533×210×92', '533×210×109', '457×191×74']
const SIZE_BESIDE_CORE = '457×191×82'
/** The bay in primer: 4–5 / D–E. */
const MARKED = { column: 3, row: 3 }
const COLUMN_GAP = 4
const BEAM_GAP = 2

const positions = (bays: readonly number[]) => bays.reduce<number[]>((lines, bay) => [...lines, lines.at(-1)! + bay], [0])
const xs = positions(BAYS_X)
const ys = positions(BAYS_Y)
const depth = ys.at(-1)!
const px = (x: number) => LEFT + x * SCALE
const py = (y: number) => TOP + (depth - y) * SCALE

interface Segment { x1: number, y1: number, x2: number, y2: number, isMarked: boolean }

/** Parts of a line from `from` to `to` outside the cores that it crosses. */
function outsideCores(x: number, from: number, to: number): [number, number][] {
  const core = CORES.find(({ x: left, width, y, height }) => x > left && x < left + width && y < to && y + height > from)
  return core ? [[from, core.y], [core.y + core.height, to]] : [[from, to]]
}

function secondaries(): Segment[] {
  return BAYS_Y.flatMap((bay, row) => BAYS_X.flatMap((width, column) => [1, 2].flatMap((third) => {
    const x = xs[column]! + width * third / 3
    const isMarked = row === MARKED.row && column === MARKED.column
    return outsideCores(x, ys[row]!, ys[row]! + bay).map(([from, to]) => ({
      x1: px(x), x2: px(x), y1: py(from) - BEAM_GAP, y2: py(to) + BEAM_GAP, isMarked,
    }))
  })))
}

function onColumnLines(): Segment[] {
  return BAYS_Y.flatMap((bay, row) => xs.map((x, line) => ({
    x1: px(x), x2: px(x), y1: py(ys[row]!) - COLUMN_GAP, y2: py(ys[row]! + bay) + COLUMN_GAP,
    isMarked: row === MARKED.row && (line === MARKED.column || line === MARKED.column + 1),
  })))
}

function primaries(): (Segment & { size: string, sizeAt: number })[] {
  return ys.flatMap((y, line) => BAYS_X.map((bay, column) => {
    const x = xs[column]!
    const isBesideCore = (line === 2 || line === 3) && CORES.some(core => core.x > x && core.x < x + bay)
    return {
      x1: px(x) + COLUMN_GAP, x2: px(x + bay) - COLUMN_GAP, y1: py(y), y2: py(y),
      isMarked: column === MARKED.column && (line === MARKED.row || line === MARKED.row + 1),
      size: isBesideCore ? SIZE_BESIDE_CORE : SIZES[line]!,
      /** Of the size, from the line: past the slab's edge on the uppermost line. */
      sizeAt: line === 2 ? 12 : line === ys.length - 1 ? -8 : -6,
    }
  }))
}

function trimmers(): Segment[] {
  return CORES.flatMap(({ x, y, width, height }) => {
    const row = ys.findLastIndex(line => line <= y)
    const low = py(ys[row]!) - BEAM_GAP
    const high = py(ys[row + 1]!) + BEAM_GAP
    const side = (at: number) => ({ x1: px(at), x2: px(at), y1: low, y2: high, isMarked: false })
    const head = (at: number) => ({ x1: px(x), x2: px(x + width), y1: py(at), y2: py(at), isMarked: false })
    return [side(x), side(x + width), head(y), head(y + height)]
  })
}

export const SIGN_IN_DRAWING = {
  width: 1100,
  height: 832,
  left: px(0),
  right: px(xs.at(-1)!),
  top: py(depth),
  bottom: py(0),
  gridX: xs.map((x, i) => ({ label: String(i + 1), at: px(x) })),
  gridY: ys.map((y, i) => ({ label: 'ABCDEF'[i]!, at: py(y) })),
  baysX: BAYS_X.map((bay, i) => ({ length: bay, at: (px(xs[i]!) + px(xs[i + 1]!)) / 2 })),
  baysY: BAYS_Y.map((bay, i) => ({ length: bay, at: (py(ys[i]!) + py(ys[i + 1]!)) / 2 })),
  lengthX: xs.at(-1)!,
  lengthY: depth,
  secondaries: secondaries(),
  onColumnLines: onColumnLines(),
  primaries: primaries(),
  trimmers: trimmers(),
  columns: xs.flatMap(x => ys.map(y => ({ x: px(x), y: py(y) }))),
  cores: CORES.map(({ x, y, width, height }) => ({ x: px(x), y: py(y + height), width: width * SCALE, height: height * SCALE })),
  marked: {
    x: px(xs[MARKED.column]!), y: py(ys[MARKED.row + 1]!),
    width: BAYS_X[MARKED.column]! * SCALE, height: BAYS_Y[MARKED.row]! * SCALE,
  },
  tenMetres: 10_000 * SCALE,
}
