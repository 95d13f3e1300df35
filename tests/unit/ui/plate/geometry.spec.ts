import { describe, expect, it } from 'vitest'
import { boundsOf, coversPoint, isRectangle, mapOutline, spansInside } from '~~/app/utils/plate/outline'
import { attractors, snapCoordinate, snapToModule, snapWithin } from '~~/app/utils/plate/snap'
import { fitView, MARGIN, scaleBarMetres, toScreen, toWorld, zoomAt } from '~~/app/utils/plate/view'
import { officePlate, schoolPlate } from './plates'

describe('outline', () => {
  const { outline } = schoolPlate()

  it('covers its edges and corners, not the cut-out', () => {
    expect(coversPoint(outline, [21600, 18000])).toBe(true)
    expect(coversPoint(outline, [0, 20000])).toBe(true)
    expect(coversPoint(outline, [30000, 17999])).toBe(true)
    expect(coversPoint(outline, [30000, 18001])).toBe(false)
    expect(isRectangle(outline)).toBe(false)
  })

  it('gives the parts of a line inside', () => {
    expect(spansInside(outline, 'x', 30000)).toEqual([[0, 18000]])
    expect(spansInside(outline, 'x', 14400)).toEqual([[0, 39600]])
    expect(spansInside(outline, 'y', 25200)).toEqual([[0, 21600]])
  })

  it('does not let itself be folded', () => {
    expect(mapOutline(outline, 'x', x => (x === 21600 ? 60000 : x))).toBeNull()
    expect(boundsOf(outline)).toEqual({ x: 0, y: 0, width: 57600, height: 39600 })
  })
})

describe('snap', () => {
  it('counts the module from the first line', () => {
    expect(snapToModule(10_200, 750, 0)).toBe(10_500)
    expect(snapToModule(10_200, 750, 300)).toBe(10_050)
    expect(snapToModule(10_200.4, 0, 0)).toBe(10_200)
  })

  it('stays within its bounds', () => {
    expect(snapWithin(9_010, 750, 0, 9_100, 17_900)).toBe(9_750)
    expect(snapWithin(18_400, 750, 0, 9_100, 17_900)).toBe(17_250)
    expect(snapWithin(200, 750, 0, 100, 400)).toBe(200)
  })

  it('draws a corner in to lines and edges, else to the module', () => {
    const targets = attractors(officePlate(), 'x')
    expect(targets).toContain(43000)
    expect(snapCoordinate(43_090, targets, 750, 0, 120)).toBe(43_000)
    expect(snapCoordinate(43_800, targets, 750, 0, 120)).toBe(43_500)
  })
})

describe('view', () => {
  const size = { width: 1018, height: 770 }
  const bounds = boundsOf(officePlate().outline)

  it('fits the plate between the margins with north up', () => {
    const view = fitView(bounds, size)
    const [left, bottom] = toScreen(view, [0, 0])
    const [right, top] = toScreen(view, [54000, 36000])
    expect(left).toBeGreaterThanOrEqual(MARGIN.left - 1e-9)
    expect(right).toBeLessThanOrEqual(size.width - MARGIN.right + 1e-9)
    expect(top).toBeLessThan(bottom)
    expect(bottom).toBeLessThanOrEqual(size.height - MARGIN.bottom + 1e-9)
  })

  it('keeps the point under the pointer when it zooms', () => {
    const view = fitView(bounds, size)
    const before = toWorld(view, [400, 300])
    const after = toWorld(zoomAt(view, [400, 300], 1.7), [400, 300])
    expect(after[0]).toBeCloseTo(before[0], 6)
    expect(after[1]).toBeCloseTo(before[1], 6)
  })

  it('draws a scale bar of a round length', () => {
    expect(scaleBarMetres({ scale: 0.0147, x: 0, y: 0 })).toBe(10)
    expect(scaleBarMetres({ scale: 0.05, x: 0, y: 0 })).toBe(2)
    expect(scaleBarMetres({ scale: 0.0028, x: 0, y: 0 })).toBe(50)
  })
})
