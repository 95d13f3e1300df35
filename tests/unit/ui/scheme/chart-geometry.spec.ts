import { describe, expect, it } from 'vitest'
import {
  dotsPath, historyPath, nearestPoint, niceDomain, niceStep, stepAlong, stepPath, ticksOf, tradeOffPoints, type ChartPoint,
} from '~~/app/utils/scheme/chartGeometry'

const point = (key: string, depth: number, massPerArea: number, onTradeOffLine = false): ChartPoint =>
  ({ key, number: 1, depth, massPerArea, slab: 0, depthCap: null, onTradeOffLine })
const same = (value: number) => value
const frame = { left: 0, right: 900, top: 0, bottom: 100 }

describe('chart of steel against depth', () => {
  it('steps the trade-off line from the top edge through each scheme to the right edge', () => {
    const line = [{ depth: 500, massPerArea: 45 }, { depth: 600, massPerArea: 40 }]
    expect(stepPath(line, same, same, frame)).toBe('M500 0V45H600V40H900')
  })

  it('draws nothing for an empty line', () => {
    expect(stepPath([], same, same, frame)).toBe('')
    expect(historyPath([], 10, same, same)).toBe('')
  })

  it('orders the trade-off line by depth and leaves the other schemes out', () => {
    const points = [point('a', 700, 30, true), point('b', 500, 40, true), point('c', 600, 50)]
    expect(tradeOffPoints(points).map(each => each.key)).toEqual(['b', 'a'])
  })

  it('walks along the line with the arrow keys and stops at its ends', () => {
    const line = [point('b', 500, 40, true), point('a', 700, 30, true)]
    expect(stepAlong(line, null, 1)?.key).toBe('a')
    expect(stepAlong(line, 'a', 1)?.key).toBe('a')
    expect(stepAlong(line, 'a', -1)?.key).toBe('b')
    expect(stepAlong([], 'a', -1)).toBeNull()
  })

  it('finds the nearest scheme within reach only', () => {
    const points = [point('a', 10, 10), point('b', 30, 10)]
    expect(nearestPoint(points, { x: 12, y: 11 }, same, same)?.key).toBe('a')
    expect(nearestPoint(points, { x: 28, y: 12 }, same, same)?.key).toBe('b')
    expect(nearestPoint(points, { x: 200, y: 200 }, same, same)).toBeNull()
  })

  it('cuts an axis into round steps', () => {
    expect(niceStep(30, 6)).toBe(5)
    expect(niceStep(0.4, 5)).toBeCloseTo(0.1, 12)
    expect(niceDomain(31.2, 60.4, 5)).toEqual([30, 65])
    expect(niceDomain(30, 30, 5)).toEqual([30, 35])
    expect(ticksOf([30, 45], 5)).toEqual([30, 35, 40, 45])
  })

  it('keeps the curve of the lightest flat until a lighter one is found', () => {
    const history = [{ examined: 1, massPerArea: 44 }, { examined: 5, massPerArea: 38 }]
    expect(historyPath(history, 9, same, same)).toBe('M1 44H5V38H9')
  })

  it('draws all schemes as one path of dots', () => {
    expect(dotsPath([point('a', 1, 2), point('b', 3, 4)], same, same)).toBe('M1 2h0M3 4h0')
  })
})
