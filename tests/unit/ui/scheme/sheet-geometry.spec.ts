import { describe, expect, it } from 'vitest'
import { diagramArea, diagramLine, figureRows, loadHeight, perUnit, shearFigures, spread, stations } from '~~/app/utils/scheme/sheetGeometry'

const axis = { left: 50, right: 350, span: 9000 }

describe('diagrams of a calculation sheet', () => {
  it('puts every diagram on the same axis', () => {
    expect(diagramLine(axis, [0, 3000, 9000], [0, 100, 0], 10, 0.5)).toBe('M50 10L150 60L350 10')
    expect(diagramArea(axis, [0, 9000], [4, -4], 10, 1)).toBe('M50 10L50 14L350 6L350 10Z')
  })

  it('scales the largest value to the height and nothing to nothing', () => {
    expect(perUnit(100, [10, -50], [20])).toBe(2)
    expect(perUnit(100, [0, 0])).toBe(0)
    expect(loadHeight(5, 10, 20)).toBe(10)
    expect(loadHeight(0.1, 10, 20)).toBe(5)
  })

  it('strings supports, loads and restraints once each', () => {
    expect(stations(9000, [6000, 3000, 3000, 0, 9500])).toEqual([0, 3000, 6000, 9000])
  })

  it('writes the shear behind one jump and before the next, once where both are alike', () => {
    const peaks = [{ x: 0, value: 222.6 }, { x: 3000, value: 218.9 }, { x: 3000, value: 1.8 }, { x: 6000, value: -1.8 }, { x: 6000, value: -218.9 }, { x: 9000, value: -222.6 }]
    expect(shearFigures(axis, peaks)).toEqual([
      { x: 1500, value: 222.6, anchor: 'middle' },
      { x: 3000, value: 1.8, anchor: 'start' }, { x: 6000, value: -1.8, anchor: 'end' },
      { x: 7500, value: -222.6, anchor: 'middle' },
    ])
  })

  it('leaves out the shear of a stretch that is too short for a figure, but never the largest', () => {
    const short = [{ x: 0, value: 90 }, { x: 600, value: 88 }, { x: 600, value: 40 }, { x: 1200, value: 39 }, { x: 1200, value: 5 }, { x: 9000, value: -50 }]
    expect(shearFigures(axis, short).map(each => each.value)).toEqual([90, 5, -50])
  })

  it('lifts a figure that would run into its neighbour', () => {
    expect(figureRows([100, 126, 204, 300], 50)).toEqual([0, 1, 0, 0])
  })

  it('keeps figures apart', () => {
    expect(spread([10, 12, 80], 30)).toEqual([10, 40, 80])
  })
})
