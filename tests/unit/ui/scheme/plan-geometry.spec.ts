import { describe, expect, it } from 'vitest'
import {
  bayDimensions, beamSegment, crossingIndex, extentOf, lineWeights, liesOn, memberAt, nextMember, placeKey, planView, sizeLabel, withoutOverlap, type PlanBeam,
} from '~~/app/utils/scheme/planGeometry'

const primary: PlanBeam = { mark: 'P1', kind: 'primary', from: [0, 0], to: [9000, 0], section: 'UB 457x191x67' }
const secondary: PlanBeam = { mark: 'S1', kind: 'secondary', from: [3000, 0], to: [3000, 7500], section: 'UB 406x140x39' }
const margins = { left: 10, right: 10, top: 20, bottom: 0 }
const view = planView({ left: 0, right: 9000, bottom: 0, top: 7500 }, { width: 920, height: 770 }, margins)

describe('framing plan', () => {
  it('draws to one scale with the north up', () => {
    expect(view.scale).toBeCloseTo(0.1, 12)
    expect(view.x(9000)).toBeCloseTo(910, 9)
    expect(view.y(7500)).toBeCloseTo(20, 9)
    expect(view.y(0)).toBeCloseTo(770, 9)
  })

  it('stops a secondary beam short of the primary beam and a primary beam short of its columns', () => {
    const crossing = crossingIndex([primary, secondary])
    const columns = new Set([placeKey([0, 0]), placeKey([9000, 0])])
    const gaps = { atColumn: 5, atBeam: 3 }
    expect(beamSegment(primary, view, columns, crossing, gaps)).toEqual({ x1: 15, y1: 770, x2: 905, y2: 770 })
    const cut = beamSegment(secondary, view, columns, crossing, gaps)
    expect(cut.y1).toBeCloseTo(767, 9)
    expect(cut.y2).toBeCloseTo(20, 9)
  })

  it('writes a size along its beam and leaves it out where it does not fit', () => {
    const segment = { x1: 0, y1: 100, x2: 200, y2: 100 }
    expect(sizeLabel(primary, segment, '457×191×67', 2, 10)).toMatchObject({ x: 100, y: 96, turned: false })
    expect(sizeLabel(primary, { ...segment, x2: 30 }, '457×191×67', 2, 10)).toBeNull()
    expect(sizeLabel(secondary, { x1: 50, y1: 0, x2: 50, y2: 200 }, '406×140×39', 2, 10)).toMatchObject({ x: 46, y: 100, turned: true })
  })

  it('keeps a turned size clear of the lower end of a short bay', () => {
    const label = sizeLabel(secondary, { x1: 50, y1: 70, x2: 50, y2: 0 }, '406×140×39', 2, 9)
    expect(label?.y).toBeLessThan(35)
    expect(label?.y).toBeGreaterThan(25)
  })

  it('leaves out a size that would run over a more important one', () => {
    const label = (mark: string, x: number) => ({ mark, text: '305×102×33', x, y: 0, turned: true, fontSize: 9 })
    expect(withoutOverlap([label('a', 0), label('b', 6), label('c', 30)]).map(each => each.mark)).toEqual(['a', 'c'])
  })

  it('gives each zoom its line weights and sizes', () => {
    expect(lineWeights(6.9).sizes).toBe('none')
    expect(lineWeights(7).sizes).toBe('chosen')
    expect(lineWeights(13)).toMatchObject({ primary: 2.6, secondary: 1.2, sizes: 'all', secondarySize: 9 })
    expect(lineWeights(25)).toMatchObject({ primary: 3.2, secondarySize: 10 })
  })

  it('goes to the nearest member in the direction of an arrow key', () => {
    const places: { mark: string, at: [number, number] }[] = [
      { mark: 'a', at: [0, 0] }, { mark: 'b', at: [1000, 100] }, { mark: 'c', at: [3000, 0] }, { mark: 'd', at: [0, 2000] },
    ]
    expect(nextMember(places, 'a', [1, 0])).toBe('b')
    expect(nextMember(places, 'a', [0, 1])).toBe('d')
    expect(nextMember(places, 'a', [-1, 0])).toBe('a')
    expect(nextMember(places, null, [1, 0])).toBe('a')
  })

  it('strings the bays in order of their lines', () => {
    const string = bayDimensions([{ at: 9000 }, { at: 0 }, { at: 16500 }], mm => String(mm))
    expect(string).toEqual([{ from: 0, to: 9000, text: '9000' }, { from: 9000, to: 16500, text: '7500' }])
  })

  it('knows which points lie on a beam', () => {
    expect(liesOn([4500, 0], primary)).toBe(true)
    expect(liesOn([4500, 2], primary)).toBe(false)
    expect(liesOn([9001.5, 0], primary)).toBe(false)
  })

  it('picks the column before the beam that ends on it, and nothing out of reach', () => {
    const columns = [{ mark: 'C1', at: [0, 0] as [number, number] }]
    const beams = [primary, secondary]
    expect(memberAt([120, 80], columns, beams, 300)).toBe('C1')
    expect(memberAt([4000, 150], columns, beams, 300)).toBe('P1')
    expect(memberAt([3100, 4000], columns, beams, 300)).toBe('S1')
    expect(memberAt([5000, 4000], columns, beams, 300)).toBeNull()
  })

  it('takes the extent of an outline', () => {
    expect(extentOf([[0, 5], [20, -5]])).toEqual({ left: 0, right: 20, bottom: -5, top: 5 })
  })
})
