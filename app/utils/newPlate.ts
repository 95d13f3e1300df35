import { PlateSchema, type Plate, type PlateInput } from '#shared/schemas/plate'
import { letterLabel, numberLabel } from './plate/labels'

export interface NewPlate {
  name: string
  /** mm */
  baysX: readonly number[]
  baysY: readonly number[]
  slab: PlateInput['slab']
  floorLoad: PlateInput['floorLoad']
  storeys: number
  /** mm */
  storeyHeight: number
}

function positions(bays: readonly number[]): number[] {
  return bays.reduce<number[]>((lines, bay) => [...lines, (lines.at(-1) ?? 0) + bay], [0])
}

/** A rectangular plate on the outer grid lines: numbers along x, letters along y, I and O skipped. */
export function newPlate({ name, baysX, baysY, ...rest }: NewPlate): Plate {
  const x = positions(baysX)
  const y = positions(baysY)
  const right = x.at(-1) ?? 0
  const top = y.at(-1) ?? 0
  return PlateSchema.parse({
    format: 'baywright-plate',
    version: 1,
    name,
    gridX: x.map((at, i) => ({ label: numberLabel(i), at })),
    gridY: y.map((at, i) => ({ label: letterLabel(i), at })),
    outline: [[0, 0], [right, 0], [right, top], [0, top]],
    ...rest,
  })
}
