/** Column positions of the drawn grid, as the engine frames it. */
import { bayGrid, isCrossing, outlineFault, plateModel } from '#shared/engine/plate'
import type { Plate } from '#shared/schemas/plate'

export interface ColumnPosition { x: number, y: number, at: [number, number], isOmitted: boolean }

/** Every crossing that belongs to the frame, save those strictly inside a void; none for an outline at fault. */
export function columnPositions(plate: Plate): ColumnPosition[] {
  if (outlineFault(plate.outline)) return []
  const omitted = new Set(plate.omittedColumns.map(column => `${column.x}/${column.y}`))
  const bays = bayGrid(plateModel(plate), {
    xs: plate.gridX.map(line => line.at), ys: plate.gridY.map(line => line.at),
  })
  return plate.gridX.flatMap((lineX, x) => plate.gridY.flatMap((lineY, y): ColumnPosition[] => {
    const at: [number, number] = [lineX.at, lineY.at]
    if (!isCrossing(bays, x, y) || isInVoid(plate, at)) return []
    return [{ x, y, at, isOmitted: omitted.has(`${lineX.label}/${lineY.label}`) }]
  }))
}

function isInVoid(plate: Plate, [x, y]: [number, number]): boolean {
  return plate.voids.some(each => (
    x > each.x && x < each.x + each.width && y > each.y && y < each.y + each.height
  ))
}
