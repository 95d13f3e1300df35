import { moveOutlineEdge } from '~/utils/plate/building'
import { placeArea, removeArea, removeLineLoad, toggleColumn } from '~/utils/plate/elements'
import { gridOf, moveGridLine, removeGridLine } from '~/utils/plate/grid'
import { neighbour, type Selection } from '~/utils/plate/selection'

const FINE_MM = 100
const ARROWS: Record<string, [number, number]> = {
  ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, 1], ArrowDown: [0, -1],
}

export interface KeyHooks {
  /** Opens the field of the selection's number; `second` asks for the other one of a bay. */
  edit: (second: boolean) => void
  cancel: () => boolean
  fit: () => void
  zoom: (factor: number) => void
}

/** Keys on the drawing: everything that the pointer does. */
export function usePlateKeys(hooks: KeyHooks) {
  const store = usePlateStore()

  function arrow(dx: number, dy: number, isFine: boolean) {
    const { document, selection } = store
    if (!document) return
    if (!selection) return store.select({ kind: 'bay', x: 0, y: document.gridY.length - 2 })
    const by = isFine ? FINE_MM : store.module
    switch (selection.kind) {
      case 'bay':
      case 'column': return store.select(neighbour(document, selection, dx, dy))
      case 'line': return moveLine(selection, dx, dy, by)
      case 'area': {
        const area = document[selection.area][selection.index]
        if (!area) return
        const box = dx !== 0 ? { x: area.x + dx * by } : { y: area.y + dy * by }
        return void store.run(plate => placeArea(plate, selection.area, selection.index, box))
      }
      case 'edge': return moveEdge(selection.index, dx * by, dy * by)
      case 'lineLoad':
    }
  }

  /** Across itself a line moves; along itself the selection goes on to the next line. */
  function moveLine(selection: Extract<Selection, { kind: 'line' }>, dx: number, dy: number, by: number) {
    const { document } = store
    if (!document) return
    const { axis, index } = selection
    const across = axis === 'x' ? dx : dy
    if (across === 0) {
      const along = axis === 'x' ? dy : dx
      return store.select(axis === 'x' ? neighbour(document, selection, along, 0) : neighbour(document, selection, 0, along))
    }
    const at = (gridOf(document, axis)[index]?.at ?? 0) + across * by
    store.run(plate => moveGridLine(plate, axis, index, at))
  }

  function moveEdge(index: number, dx: number, dy: number) {
    const { document } = store
    const a = document?.outline[index]
    const b = document?.outline[(index + 1) % (document?.outline.length ?? 1)]
    if (!a || !b) return
    const axis = a[0] === b[0] ? 'x' : 'y'
    const by = axis === 'x' ? dx : dy
    if (by !== 0) store.run(plate => moveOutlineEdge(plate, axis, index, (axis === 'x' ? a[0] : a[1]) + by))
  }

  function remove() {
    const { document, selection } = store
    if (!document || !selection) return
    switch (selection.kind) {
      case 'line': return void store.run(plate => removeGridLine(plate, selection.axis, selection.index))
      case 'area': return void store.run(plate => removeArea(plate, selection.area, selection.index))
      case 'lineLoad': return void store.run(plate => removeLineLoad(plate, selection.index))
      case 'column': {
        const labels = [document.gridX[selection.x]?.label ?? '', document.gridY[selection.y]?.label ?? ''] as const
        return void store.run(plate => toggleColumn(plate, ...labels))
      }
      case 'bay':
      case 'edge':
    }
  }

  function escape() {
    if (hooks.cancel()) return
    if (store.tool !== 'select') store.tool = 'select'
    else store.select(null)
  }

  /** Lines beside a selected bay. */
  function selectLine(axis: 'x' | 'y') {
    const { selection } = store
    const index = selection?.kind === 'bay' || selection?.kind === 'column' ? selection[axis] : 0
    store.select({ kind: 'line', axis, index })
  }

  function act(event: KeyboardEvent): boolean {
    const step = ARROWS[event.key]
    if (step) return arrow(step[0], step[1], event.shiftKey), true
    switch (event.key) {
      case 'Enter': return hooks.edit(event.shiftKey), true
      case 'Escape': return escape(), true
      case 'Delete':
      case 'Backspace': return remove(), true
      case 'n': return selectLine('x'), true
      case 'l': return selectLine('y'), true
      case '+':
      case '=': return hooks.zoom(1.25), true
      case '-': return hooks.zoom(0.8), true
      case '0': return hooks.fit(), true
      default: return false
    }
  }

  function onKey(event: KeyboardEvent) {
    if (event.ctrlKey || event.metaKey || event.altKey) return
    if (act(event)) event.preventDefault()
  }

  return { onKey }
}
