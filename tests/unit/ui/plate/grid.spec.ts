import { describe, expect, it } from 'vitest'
import { THIN_SPACE } from '#shared/utils/format'
import type { Plate } from '#shared/schemas/plate'
import {
  addGridLine, baysOf, insertBay, moveGridLine, partBay, removeGridLine, setBay, setBays, setLabel, setPinned, splitBay,
} from '~~/app/utils/plate/grid'
import { applyPatch, type Outcome } from '~~/app/utils/plate/steps'
import { officePlate, schoolPlate } from './plates'

function done(plate: Plate, outcome: Outcome): Plate {
  if ('refusal' in outcome) throw new Error(outcome.refusal)
  return applyPatch(plate, outcome.patch).plate
}

const labels = (lines: { label: string }[]) => lines.map(line => line.label).join(' ')

describe('moving a grid line', () => {
  it('keeps its neighbours and leaves the outline of an inner line alone', () => {
    const plate = officePlate()
    const moved = done(plate, moveGridLine(plate, 'y', 3, 20000))
    expect(baysOf(moved.gridY)).toEqual([7500, 7500, 5000, 8500, 7500])
    expect(moved.outline).toEqual(plate.outline)
  })

  it('takes the outline along with an outer line, its overhang kept', () => {
    const plate = officePlate({ outline: [[-150, 0], [54150, 0], [54150, 36000], [-150, 36000]] })
    const moved = done(plate, moveGridLine(plate, 'x', 6, 52500))
    expect(moved.outline).toEqual([[-150, 0], [52650, 0], [52650, 36000], [-150, 36000]])
  })

  it('takes the re-entrant edge along with the line that it stands on', () => {
    const plate = schoolPlate()
    const moved = done(plate, moveGridLine(plate, 'x', 3, 22500))
    expect(moved.outline).toEqual([[0, 0], [57600, 0], [57600, 18000], [22500, 18000], [22500, 39600], [0, 39600]])
  })

  it('refuses to pass a neighbour, in words that say where the line may stand', () => {
    expect(moveGridLine(officePlate(), 'y', 3, 28500)).toEqual({
      refusal: `Line D at 28${THIN_SPACE}500${THIN_SPACE}mm would pass its neighbour. It may stand at 15${THIN_SPACE}100${THIN_SPACE}mm to 28${THIN_SPACE}400${THIN_SPACE}mm.`,
    })
  })
})

describe('adding and removing lines', () => {
  it('relabels after an insertion, and takes omitted columns along by name', () => {
    const plate = officePlate({ omittedColumns: [{ x: '4', y: 'C', line: 'x' }] })
    const added = done(plate, addGridLine(plate, 'x', 12000))
    expect(labels(added.gridX)).toBe('1 2 3 4 5 6 7 8')
    expect(added.gridX[2]).toEqual({ label: '3', at: 12000, pinned: false })
    expect(added.omittedColumns).toEqual([{ x: '5', y: 'C', line: 'x' }])
  })

  it('keeps a label that was typed', () => {
    const plate = done(officePlate(), setLabel(officePlate(), 'x', 2, 'W'))
    const added = done(plate, addGridLine(plate, 'x', 12000))
    expect(labels(added.gridX)).toBe('1 2 3 W 4 5 6 7')
  })

  it('draws the outline out to a line beyond the last and in again when it goes', () => {
    const plate = officePlate()
    const added = done(plate, addGridLine(plate, 'x', 60000))
    expect(added.outline).toEqual([[0, 0], [60000, 0], [60000, 36000], [0, 36000]])
    expect(done(added, removeGridLine(added, 'x', 7))).toEqual(plate)
  })

  it('puts a bay in and shifts the rest with what stands on it', () => {
    const plate = officePlate()
    const wider = done(plate, insertBay(plate, 'x', 3, 3000))
    expect(baysOf(wider.gridX)).toEqual([9000, 9000, 9000, 3000, 9000, 9000, 9000])
    expect(wider.voids[0]?.x).toBe(41000)
    expect(wider.keepClear[0]).toEqual(plate.keepClear[0])
    expect(wider.zones[0]).toMatchObject({ x: 18000, width: 21000 })
  })

  it('refuses the removal of one of two lines and of a line under an L', () => {
    const narrow = officePlate({ gridX: [{ label: '1', at: 0 }, { label: '2', at: 54000 }] })
    expect(removeGridLine(narrow, 'x', 1)).toHaveProperty('refusal', expect.stringContaining('at least two grid lines'))
    expect(removeGridLine(schoolPlate(), 'x', 8)).toHaveProperty('refusal', expect.stringContaining('outline'))
  })

  it('refuses a line on top of another', () => {
    expect(addGridLine(officePlate(), 'x', 9050)).toHaveProperty('refusal', expect.stringContaining('Line 2 stands at'))
  })
})

describe('bays', () => {
  it('shifts the rest, or lets the next bay take up the difference', () => {
    const plate = officePlate()
    expect(baysOf(done(plate, setBay(plate, 'x', 3, 7500)).gridX)).toEqual([9000, 9000, 9000, 7500, 9000, 9000])
    expect(baysOf(done(plate, setBay(plate, 'x', 3, 7500, 'keep')).gridX)).toEqual([9000, 9000, 9000, 7500, 10500, 9000])
  })

  it('sets all bays of a rectangle, the edge with them', () => {
    const plate = officePlate()
    const set = done(plate, setBays(plate, 'y', [7500, 7500, 6000]))
    expect(labels(set.gridY)).toBe('A B C D')
    expect(set.outline).toEqual([[0, 0], [54000, 0], [54000, 21000], [0, 21000]])
  })

  it('keeps the corners of an L on their lines, and refuses another number of bays', () => {
    const plate = schoolPlate()
    const set = done(plate, setBays(plate, 'y', [7500, 3000, 8000, 7200, 7200, 7200]))
    expect(set.outline).toEqual([[0, 0], [57600, 0], [57600, 18500], [21600, 18500], [21600, 40100], [0, 40100]])
    expect(setBays(plate, 'y', [9000, 9000])).toHaveProperty('refusal', expect.stringContaining('stays 6'))
  })

  it('splits a bay into whole millimetres that add up', () => {
    const plate = officePlate()
    const split = done(plate, splitBay(plate, 'y', 2, 7))
    const bays = baysOf(split.gridY).slice(2, 9)
    expect(bays.reduce((sum, bay) => sum + bay, 0)).toBe(6000)
    expect(Math.max(...bays) - Math.min(...bays)).toBeLessThanOrEqual(1)
    expect(split.gridY.at(-1)).toEqual({ label: 'M', at: 36000, pinned: false })
  })

  it('parts a bay into typed bays and shifts the rest by what they add', () => {
    const plate = officePlate()
    const parted = done(plate, partBay(plate, 'x', 0, [4500, 6000]))
    expect(baysOf(parted.gridX)).toEqual([4500, 6000, 9000, 9000, 9000, 9000, 9000])
    expect(parted.outline[1]).toEqual([55500, 0])
  })
})

describe('labels and pins', () => {
  it('lets the series follow its first label', () => {
    const plate = officePlate({ omittedColumns: [{ x: '3', y: 'C', line: 'x' }] })
    const set = done(plate, setLabel(plate, 'x', 0, '11'))
    expect(labels(set.gridX)).toBe('11 12 13 14 15 16 17')
    expect(set.omittedColumns[0]?.x).toBe('13')
  })

  it('refuses a label twice', () => {
    expect(setLabel(officePlate(), 'x', 0, '4')).toHaveProperty('refusal', expect.stringContaining('another line'))
  })

  it('pins one line only', () => {
    const plate = officePlate()
    const pinned = done(plate, setPinned(plate, 'x', 3, true))
    expect(pinned.gridX.filter(line => line.pinned).map(line => line.label)).toEqual(['4'])
  })
})
