import { columnPositions } from '~/utils/plate/columns'
import type { Preview } from '~/utils/plate/draw/marks'
import { dragIntents, snapPoint, type Grip, type Intent, type IntentAt } from '~/utils/plate/drag'
import { addArea, addLineLoad, boxOfCorners, toggleColumn, type AreaKind } from '~/utils/plate/elements'
import { frameOf, type Frame } from '~/utils/plate/frame'
import { addGridLine, gridOf } from '~/utils/plate/grid'
import { hitTest, type Hit } from '~/utils/plate/hit'
import type { Axis, Point } from '~/utils/plate/outline'
import { sameSelection, type Selection } from '~/utils/plate/selection'
import { snapWithin } from '~/utils/plate/snap'
import { applyPatch, isRefusal } from '~/utils/plate/steps'
import { NARROW, panBy, toWorld, zoomAt, type Size, type View } from '~/utils/plate/view'
import type { Plate } from '#shared/schemas/plate'

/** What the drawing shows at this moment; plain values, so that no frame waits for reactivity. */
export interface DrawingState {
  plate: Plate
  columns: ReturnType<typeof columnPositions>
  view: View
  size: Size
  hover: Selection | null
  preview: Preview | null
  isDragged: boolean
}

type Gesture
  = | { kind: 'press', at: Point, hit: Hit | null }
    | { kind: 'pan', last: Point }
    | { kind: 'drag', intentAt: IntentAt, intent: Intent | null }
    | { kind: 'draw', tool: 'void' | 'keepClear' | 'zones' | 'load' | 'measure', from: Point, to: Point }

const START_PX = 4
/** Reach within which edges and lines draw a corner in, px. */
const ATTRACT_PX = 7
const FINE_MM = 100
const AREA_TOOLS: Partial<Record<string, AreaKind>> = { void: 'voids', keepClear: 'keepClear', zones: 'zones' }

export interface GestureHooks {
  redraw: (what: 'all' | 'marks') => void
  edit: (hit: Extract<Hit, { kind: 'bay-length' | 'overall' }>) => void
  cursor: (name: string) => void
}

/** Pointer gestures on the drawing: they preview, commit on drop, and Escape takes them back. */
export function usePlateGestures(state: DrawingState, hooks: GestureHooks) {
  const store = usePlateStore()
  let gesture: Gesture | null = null
  const touches = new Map<number, Point>()
  let spread = 0

  const frame = (): Frame => frameOf(state.plate, state.view, state.size)
  const hitAt = (point: Point) => hitTest({
    plate: state.plate, columns: state.columns, view: state.view, frame: frame(), selection: store.selection,
  }, point)

  const grip = (isFine: boolean): Grip => ({
    module: isFine ? FINE_MM : store.module, reach: ATTRACT_PX / state.view.scale,
  })

  function axisOfNewLine([x, y]: Point): Axis {
    const around = frame()
    if (y < around.top || y > around.bottom) return 'x'
    if (x < around.left || x > around.right) return 'y'
    return store.lineAxis
  }

  function newLine(point: Point, isFine: boolean): { axis: Axis, at: number } {
    const axis = axisOfNewLine(point)
    const world = toWorld(state.view, point)
    const at = axis === 'x' ? world[0] : world[1]
    const origin = gridOf(state.plate, axis)[0]?.at ?? 0
    return { axis, at: snapWithin(at, isFine ? FINE_MM : store.module, origin, -1_000_000, 1_000_000) }
  }

  function down(point: Point, event: PointerEvent) {
    touches.set(event.pointerId, point)
    if (touches.size === 2) return startPinch()
    if (event.button === 1 || (event.button === 0 && event.altKey)) {
      gesture = { kind: 'pan', last: point }
      return
    }
    if (event.button !== 0) return
    const { tool } = store
    if (tool === 'void' || tool === 'keepClear' || tool === 'zones' || tool === 'load' || tool === 'measure') {
      const from = snapPoint(state.plate, toWorld(state.view, point), grip(event.shiftKey))
      gesture = { kind: 'draw', tool, from, to: from }
      state.hover = null
      return
    }
    const hit = hitAt(point)
    gesture = { kind: 'press', at: point, hit }
    if (tool === 'select' && hit?.kind === 'selection' && isDraggable(hit.selection)) store.select(hit.selection)
  }

  function isDraggable(selection: Selection): boolean {
    return selection.kind === 'line' || selection.kind === 'area' || selection.kind === 'edge'
  }

  function startPinch() {
    cancel()
    gesture = null
    spread = distanceOfTouches()
  }

  function distanceOfTouches(): number {
    const [a, b] = [...touches.values()]
    return a && b ? Math.hypot(a[0] - b[0], a[1] - b[1]) : 0
  }

  function pinch() {
    const [a, b] = [...touches.values()]
    const next = distanceOfTouches()
    if (!a || !b || spread === 0) return
    state.view = zoomAt(state.view, [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2], next / spread)
    spread = next
    hooks.redraw('all')
  }

  function move(point: Point, event: PointerEvent) {
    const before = touches.get(event.pointerId)
    if (before) touches.set(event.pointerId, point)
    if (touches.size === 2) return pinch()
    if (!gesture) return hover(point, event)
    switch (gesture.kind) {
      case 'press': return maybeStart(gesture, point)
      case 'pan': {
        state.view = panBy(state.view, point[0] - gesture.last[0], point[1] - gesture.last[1])
        gesture.last = point
        return hooks.redraw('all')
      }
      case 'drag': return drag(gesture, point, event.shiftKey)
      case 'draw': return draw(gesture, point, event.shiftKey)
    }
  }

  function hover(point: Point, event: PointerEvent) {
    if (store.tool === 'line') {
      state.preview = { kind: 'new-line', ...newLine(point, event.shiftKey) }
      hooks.cursor('crosshair')
      return hooks.redraw('marks')
    }
    const hit = hitAt(point)
    const next = hit?.kind === 'selection' ? hit.selection : null
    hooks.cursor(cursorFor(hit))
    if (sameSelection(next, state.hover)) return
    state.hover = next
    hooks.redraw('marks')
  }

  function cursorFor(hit: Hit | null): string {
    if (store.tool === 'column') return hit?.kind === 'selection' && hit.selection.kind === 'column' ? 'pointer' : 'default'
    if (store.tool !== 'select') return 'crosshair'
    if (!hit) return 'default'
    if (hit.kind === 'bay-length' || hit.kind === 'overall') return 'text'
    if (hit.kind === 'handle') {
      const { x, y } = hit.handle
      if (x === 0) return 'ns-resize'
      if (y === 0) return 'ew-resize'
      return x === y ? 'nesw-resize' : 'nwse-resize'
    }
    if (hit.selection.kind === 'line') return hit.selection.axis === 'x' ? 'ew-resize' : 'ns-resize'
    return hit.selection.kind === 'area' ? 'move' : 'pointer'
  }

  function maybeStart(press: Extract<Gesture, { kind: 'press' }>, point: Point) {
    if (Math.hypot(point[0] - press.at[0], point[1] - press.at[1]) < START_PX) return
    const intentAt = store.tool === 'select' && store.rights !== 'none' && state.size.width >= NARROW
      ? dragIntents(state.plate, press.hit, toWorld(state.view, press.at))
      : null
    gesture = intentAt
      ? { kind: 'drag', intentAt, intent: null }
      : { kind: 'pan', last: point }
    state.isDragged = intentAt !== null
    state.hover = null
    hooks.cursor(intentAt ? cursorFor(press.hit) : 'grabbing')
  }

  function drag(current: Extract<Gesture, { kind: 'drag' }>, point: Point, isFine: boolean) {
    const intent = current.intentAt(toWorld(state.view, point), grip(isFine))
    const base = store.document
    if (!base) return
    const outcome = intent(base)
    if (isRefusal(outcome)) return
    current.intent = intent
    state.plate = applyPatch(base, outcome.patch).plate
    state.columns = columnPositions(state.plate)
    hooks.redraw('all')
  }

  function draw(current: Extract<Gesture, { kind: 'draw' }>, point: Point, isFine: boolean) {
    const to = snapPoint(state.plate, toWorld(state.view, point), grip(isFine))
    current.to = current.tool === 'load' ? straightened(current.from, to) : to
    const { from } = current
    if (current.tool === 'load') state.preview = { kind: 'new-load', from, to: current.to }
    else if (current.tool === 'measure') state.preview = { kind: 'distance', from, to: current.to }
    else state.preview = { kind: 'new-area', box: boxOfCorners(from, current.to) }
    hooks.redraw('marks')
  }

  function straightened(from: Point, to: Point): [number, number] {
    return Math.abs(to[0] - from[0]) >= Math.abs(to[1] - from[1]) ? [to[0], from[1]] : [from[0], to[1]]
  }

  function up(point: Point, event: PointerEvent) {
    touches.delete(event.pointerId)
    const ended = gesture
    gesture = null
    if (!ended) return
    if (ended.kind === 'press') click(ended.hit, point, event.shiftKey)
    if (ended.kind === 'drag') finishDrag(ended.intent)
    if (ended.kind === 'draw') finishDraw(ended)
    hooks.cursor('default')
  }

  function click(hit: Hit | null, point: Point, isFine: boolean) {
    if (store.tool === 'line') {
      const { axis, at } = newLine(point, isFine)
      if (!store.run(plate => addGridLine(plate, axis, at))) {
        const index = gridOf(store.document ?? state.plate, axis).findIndex(line => line.at === at)
        store.select({ kind: 'line', axis, index })
        store.tool = 'select'
        state.preview = null
      }
      return
    }
    if (store.tool === 'column') {
      if (hit?.kind !== 'selection' || hit.selection.kind !== 'column') return
      const { x, y } = hit.selection
      // Selecting clears the last refusal, so it comes first.
      store.select(hit.selection)
      return void store.run(plate => toggleColumn(plate, plate.gridX[x]?.label ?? '', plate.gridY[y]?.label ?? ''))
    }
    if (hit?.kind === 'bay-length' || hit?.kind === 'overall') return hooks.edit(hit)
    if (hit?.kind !== 'handle') store.select(hit?.selection ?? null)
  }

  function finishDrag(intent: Intent | null) {
    state.isDragged = false
    if (intent) store.run(intent)
    settle()
  }

  function finishDraw({ tool, from, to }: Extract<Gesture, { kind: 'draw' }>) {
    if (tool === 'measure') return
    state.preview = null
    const kind = AREA_TOOLS[tool]
    const refusal = store.run(plate => (
      kind ? addArea(plate, kind, boxOfCorners(from, to)) : addLineLoad(plate, { from: [...from], to: [...to] })
    ))
    if (!refusal && store.document) {
      const list: readonly unknown[] = kind ? store.document[kind] : store.document.lineLoads
      store.select(kind ? { kind: 'area', area: kind, index: list.length - 1 } : { kind: 'lineLoad', index: list.length - 1 })
      store.tool = 'select'
    }
    hooks.redraw('all')
  }

  /** The drawing shows the stored document again. */
  function settle() {
    if (!store.document) return
    state.plate = store.document
    state.columns = columnPositions(state.plate)
    hooks.redraw('all')
  }

  /** True where there was a gesture to give up. */
  function cancel(): boolean {
    const isActive = gesture !== null || state.preview !== null
    gesture = null
    state.preview = null
    state.isDragged = false
    settle()
    return isActive
  }

  function leave() {
    state.hover = null
    if (!gesture && state.preview?.kind === 'new-line') state.preview = null
    hooks.redraw('marks')
  }

  return { down, move, up, cancel, leave, settle, frame }
}
