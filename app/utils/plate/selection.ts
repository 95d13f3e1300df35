/** What is selected on the plate; indices into the document's lists. */
import type { Plate } from '#shared/schemas/plate'
import { gridOf } from './grid'
import { AREA_WORDS, type AreaKind } from './elements'
import type { Axis } from './outline'

export type Selection
  = | { kind: 'line', axis: Axis, index: number }
    | { kind: 'bay', x: number, y: number }
    | { kind: 'area', area: AreaKind, index: number }
    | { kind: 'column', x: number, y: number }
    | { kind: 'edge', index: number }
    | { kind: 'lineLoad', index: number }

export function sameSelection(a: Selection | null, b: Selection | null): boolean {
  return JSON.stringify(a) === JSON.stringify(b)
}

/** The selection where it still exists in the document, else null. */
export function keptSelection(plate: Plate, selection: Selection | null): Selection | null {
  if (!selection) return null
  switch (selection.kind) {
    case 'line': return selection.index < gridOf(plate, selection.axis).length ? selection : null
    case 'bay': return selection.x < plate.gridX.length - 1 && selection.y < plate.gridY.length - 1 ? selection : null
    case 'column': return selection.x < plate.gridX.length && selection.y < plate.gridY.length ? selection : null
    case 'area': return selection.index < plate[selection.area].length ? selection : null
    case 'edge': return selection.index < plate.outline.length ? selection : null
    case 'lineLoad': return selection.index < plate.lineLoads.length ? selection : null
  }
}

/** "4–5 / D–E" */
export function bayName(plate: Plate, x: number, y: number): string {
  const part = (axis: Axis, i: number) => {
    const lines = gridOf(plate, axis)
    return `${lines[i]?.label ?? ''}–${lines[i + 1]?.label ?? ''}`
  }
  return `${part('x', x)} / ${part('y', y)}`
}

/** Name of the selection as the panel's title and the live region say it. */
export function selectionName(plate: Plate, selection: Selection): string {
  switch (selection.kind) {
    case 'line': return `Line ${gridOf(plate, selection.axis)[selection.index]?.label ?? ''}`
    case 'bay': return `Bay ${bayName(plate, selection.x, selection.y)}`
    case 'column': return `Column ${plate.gridX[selection.x]?.label ?? ''}/${plate.gridY[selection.y]?.label ?? ''}`
    case 'area': return plate[selection.area][selection.index]?.name ?? AREA_WORDS[selection.area].capital
    case 'edge': return 'Outline edge'
    case 'lineLoad': return plate.lineLoads[selection.index]?.name ?? 'Line load'
  }
}

/** The neighbour of a selected bay, column or line in the direction of an arrow key; the same at the border. */
export function neighbour(plate: Plate, selection: Selection, dx: number, dy: number): Selection {
  if (selection.kind === 'bay' || selection.kind === 'column') {
    const spare = selection.kind === 'bay' ? 2 : 1
    return {
      ...selection,
      x: Math.min(Math.max(selection.x + dx, 0), plate.gridX.length - spare),
      y: Math.min(Math.max(selection.y + dy, 0), plate.gridY.length - spare),
    }
  }
  if (selection.kind === 'line') {
    const by = selection.axis === 'x' ? dx : dy
    const most = gridOf(plate, selection.axis).length - 1
    return { ...selection, index: Math.min(Math.max(selection.index + by, 0), most) }
  }
  return selection
}
