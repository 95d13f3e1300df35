import { describe, expect, it } from 'vitest'
import type { Plate } from '#shared/schemas/plate'
import { columnPositions } from '~~/app/utils/plate/columns'
import { dragIntents } from '~~/app/utils/plate/drag'
import { extentOf, frameOf } from '~~/app/utils/plate/frame'
import { hitTest, type Hit } from '~~/app/utils/plate/hit'
import { keptSelection, neighbour, selectionName, type Selection } from '~~/app/utils/plate/selection'
import { applyPatch } from '~~/app/utils/plate/steps'
import { fitView, toScreen } from '~~/app/utils/plate/view'
import { officePlate, schoolPlate } from './plates'

const size = { width: 1056, height: 775 }

function sceneOf(plate: Plate, selection: Selection | null = null) {
  const view = fitView(extentOf(plate), size)
  return { plate, columns: columnPositions(plate), view, frame: frameOf(plate, view, size), selection }
}

describe('what lies under the pointer', () => {
  const scene = sceneOf(officePlate())
  const at = (x: number, y: number) => hitTest(scene, toScreen(scene.view, [x, y]))
  const selected = (hit: Hit | null) => (hit?.kind === 'selection' ? hit.selection : hit)

  it('finds bays, columns, lines, voids and the figure of a bay', () => {
    expect(selected(at(40000, 32000))).toEqual({ kind: 'bay', x: 4, y: 4 })
    expect(selected(at(27000, 21000))).toEqual({ kind: 'column', x: 3, y: 3 })
    expect(selected(at(27000, 24000))).toEqual({ kind: 'line', axis: 'x', index: 3 })
    expect(selected(at(40000, 18000))).toEqual({ kind: 'area', area: 'voids', index: 0 })
    const [x] = toScreen(scene.view, [31500, 0])
    expect(hitTest(scene, [x, scene.frame.bays.top])).toEqual({ kind: 'bay-length', axis: 'x', bay: 3 })
    const [middle] = toScreen(scene.view, [27000, 0])
    expect(hitTest(scene, [middle, scene.frame.overall.top])).toEqual({ kind: 'overall', axis: 'x' })
  })

  it('finds the bubbles at both ends', () => {
    const [, y] = toScreen(scene.view, [0, 7500])
    expect(selected(hitTest(scene, [scene.frame.bubbles.left, y]))).toEqual({ kind: 'line', axis: 'y', index: 1 })
    expect(selected(hitTest(scene, [scene.frame.bubbles.right, y]))).toEqual({ kind: 'line', axis: 'y', index: 1 })
  })

  it('finds nothing in the part that an L leaves out', () => {
    const school = sceneOf(schoolPlate())
    const hit = hitTest(school, toScreen(school.view, [40000, 30000]))
    expect(hit).toBeNull()
  })

  it('gives handles of the selected area before all else', () => {
    const withSelection = sceneOf(officePlate(), { kind: 'area', area: 'voids', index: 0 })
    const corner = toScreen(withSelection.view, [43000, 20500])
    expect(hitTest(withSelection, corner)).toEqual({ kind: 'handle', area: 'voids', index: 0, handle: { x: 1, y: 1 } })
  })
})

describe('a drag', () => {
  const grip = { module: 750, reach: 200 }

  it('moves a line on the module between its neighbours', () => {
    const plate = officePlate()
    const intents = dragIntents(plate, { kind: 'selection', selection: { kind: 'line', axis: 'y', index: 3 } }, [0, 21000])
    const outcome = intents?.([0, 19_800], grip)(plate)
    if (!outcome || 'refusal' in outcome) throw new Error('the line was not moved')
    expect(applyPatch(plate, outcome.patch).plate.gridY[3]?.at).toBe(19_500)
    const far = intents?.([0, 40_000], grip)(plate)
    if (!far || 'refusal' in far) throw new Error('the line was not moved')
    expect(applyPatch(plate, far.patch).plate.gridY[3]?.at).toBe(27_750)
  })

  it('rests an edge of a void on a grid line that is near', () => {
    const plate = officePlate()
    const intents = dragIntents(plate, { kind: 'selection', selection: { kind: 'area', area: 'voids', index: 0 } }, [40000, 18000])
    const outcome = intents?.([42_120, 18_020], grip)(plate)
    if (!outcome || 'refusal' in outcome) throw new Error('the void was not moved')
    expect(applyPatch(plate, outcome.patch).plate.voids[0]).toMatchObject({ x: 40_000, width: 5000 })
  })

  it('sizes by a handle and never turns the area inside out', () => {
    const plate = officePlate()
    const intents = dragIntents(plate, { kind: 'handle', area: 'voids', index: 0, handle: { x: -1, y: 0 } }, [38000, 18000])
    const outcome = intents?.([42_995, 18_000], { module: 100, reach: 0 })(plate)
    if (!outcome || 'refusal' in outcome) throw new Error('the void was not sized')
    expect(applyPatch(plate, outcome.patch).plate.voids[0]).toMatchObject({ x: 42_900, width: 100, y: 15500, height: 5000 })
  })
})

describe('the selection', () => {
  it('walks along the grid and stops at its border', () => {
    const plate = officePlate()
    expect(neighbour(plate, { kind: 'bay', x: 5, y: 4 }, 1, 1)).toEqual({ kind: 'bay', x: 5, y: 4 })
    expect(neighbour(plate, { kind: 'column', x: 0, y: 0 }, 1, 0)).toEqual({ kind: 'column', x: 1, y: 0 })
    expect(selectionName(plate, { kind: 'bay', x: 3, y: 3 })).toBe('Bay 4–5 / D–E')
  })

  it('is given up when its element is gone', () => {
    expect(keptSelection(officePlate({ voids: [] }), { kind: 'area', area: 'voids', index: 0 })).toBeNull()
  })
})
