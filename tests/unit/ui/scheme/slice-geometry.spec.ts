import { describe, expect, it } from 'vitest'
import { chooseSlice, floorBuildUp, iSectionPath, type SliceBeam } from '~~/app/utils/scheme/sliceGeometry'

const beam = (mark: string, section: string, from: [number, number], to: [number, number], carriedBy: string[] = []): SliceBeam =>
  ({ mark, section, place: mark, from, to, carriedBy, carries: [] })
const depths: Record<string, number> = { deep: 540, middle: 460, shallow: 400 }
const depthOf = (section: string) => depths[section] ?? 0

/** Two bays in y: lines A, B, C; the primary beam of line B is the deepest. */
const beams = [
  beam('PA', 'middle', [0, 0], [9000, 0]),
  beam('PB', 'deep', [0, 7500], [9000, 7500]),
  beam('PC', 'middle', [0, 15_000], [9000, 15_000]),
  beam('S1', 'shallow', [3000, 0], [3000, 7500], ['PA', 'PB']),
  beam('S2', 'shallow', [6000, 15_000], [6000, 7500], ['PB', 'PC']),
  beam('L1', 'shallow', [0, 0], [0, 7500], ['C1', 'C2']),
  beam('L2', 'shallow', [9000, 0], [9000, 7500], ['C3', 'C4']),
]

describe('slice through the floor', () => {
  it('cuts the deepest beam of the scheme', () => {
    const slice = chooseSlice(beams, null, depthOf)
    expect([slice?.cutAtStart?.mark, slice?.cutAtEnd?.mark]).toContain('PB')
    expect(slice?.alongX).toBe(false)
  })

  it('runs along the selected secondary beam, from its lower end to its upper end', () => {
    const slice = chooseSlice(beams, 'S2', depthOf)
    expect(slice?.seen.mark).toBe('S2')
    expect(slice?.seen.from).toEqual([6000, 7500])
    expect(slice?.cutAtStart?.mark).toBe('PB')
    expect(slice?.cutAtEnd?.mark).toBe('PC')
  })

  it('cuts a selected primary beam between its columns and looks at a beam that ends on it', () => {
    const slice = chooseSlice(beams, 'PA', depthOf)
    expect(slice?.seen.mark).toBe('S1')
    expect(slice?.cutAtStart?.mark).toBe('PA')
  })

  it('has nothing to cut without beams', () => {
    expect(chooseSlice([], null, depthOf)).toBeNull()
  })

  it('adds the parts of the floor up to what is left of the storey', () => {
    const floor = floorBuildUp({ finish: 0, slabDepth: 130, beamDepth: 540, servicesZone: 450, ceiling: 50, storeyHeight: 4000 })
    expect(floor.parts.map(part => part.name)).toEqual(['slab', 'beam', 'services', 'ceiling'])
    expect(floor.structural).toBe(670)
    expect(floor.total).toBe(1170)
    expect(floor.clear).toBe(2830)
  })

  it('draws a closed outline of the section from its top', () => {
    expect(iSectionPath({ h: 500, b: 200, tw: 10, tf: 20 }, 100, 0, 1)).toBe(
      'M0 0H200V20H105V480H200V500H0V480H95V20H0Z',
    )
  })
})
