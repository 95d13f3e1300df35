import { describe, expect, it } from 'vitest'
import type { Plate } from '#shared/schemas/plate'
import { finishesOf, moveOutlineEdge, setFinishes, setMeasure, setRoof, setSlab } from '~~/app/utils/plate/building'
import {
  addArea, addLineLoad, boxOfCorners, copyArea, placeArea, removeArea, renameArea, setLineLoad, setVoidFloors, toggleColumn,
} from '~~/app/utils/plate/elements'
import { applyPatch, type Outcome } from '~~/app/utils/plate/steps'
import { officePlate, schoolPlate } from './plates'

function done(plate: Plate, outcome: Outcome): Plate {
  if ('refusal' in outcome) throw new Error(outcome.refusal)
  return applyPatch(plate, outcome.patch).plate
}

describe('voids, zones and keep-clear zones', () => {
  it('are drawn by two corners in any order, with a name that is free', () => {
    const plate = officePlate()
    const box = boxOfCorners([14600, 5200], [12000, 0])
    expect(box).toEqual({ x: 12000, y: 0, width: 2600, height: 5200 })
    expect(done(plate, addArea(plate, 'voids', box)).voids.at(-1)).toEqual({ name: 'Void 1', ...box })
  })

  it('take the floor load over when a zone is drawn, to be changed from there', () => {
    const plate = officePlate()
    const zone = done(plate, addArea(plate, 'zones', { x: 0, y: 0, width: 9000, height: 7500 })).zones.at(-1)
    expect(zone).toMatchObject({ permanent: 3.6, variable: 3.8, category: 'B', reducible: false })
  })

  it('are refused where they would have no extent', () => {
    expect(addArea(officePlate(), 'voids', { x: 0, y: 0, width: 50, height: 900 })).toHaveProperty('refusal')
    expect(placeArea(officePlate(), 'voids', 0, { width: 0 })).toHaveProperty('refusal')
  })

  it('keep a line load on the void by its new name, and take it along when the void goes', () => {
    const plate = officePlate({ lineLoads: [{ name: 'Shaft wall', on: { void: 'Core east' }, permanent: 7, variable: 0 }] })
    const renamed = done(plate, renameArea(plate, 'voids', 0, 'Stair'))
    expect(renamed.lineLoads[0]?.on).toEqual({ void: 'Stair' })
    const removed = done(renamed, removeArea(renamed, 'voids', 0))
    expect(removed.voids).toEqual([])
    expect(removed.lineLoads).toEqual([])
  })

  it('copy beside themselves', () => {
    const plate = officePlate()
    expect(done(plate, copyArea(plate, 'voids', 0)).voids[1]).toMatchObject({ name: 'Core east 1', x: 43000, width: 5000 })
  })

  it('repeat on all floors again when the number is taken out', () => {
    const plate = done(officePlate(), setVoidFloors(officePlate(), 0, 2))
    expect(plate.voids[0]?.floors).toBe(2)
    expect(done(plate, setVoidFloors(plate, 0, undefined)).voids[0]).not.toHaveProperty('floors')
    expect(setVoidFloors(plate, 0, 5)).toHaveProperty('refusal', expect.stringContaining('1 to 4 floors'))
  })
})

describe('columns', () => {
  it('are omitted and put back', () => {
    const plate = officePlate()
    const omitted = done(plate, toggleColumn(plate, '4', 'C'))
    expect(omitted.omittedColumns).toEqual([{ x: '4', y: 'C', line: 'x' }])
    expect(done(omitted, toggleColumn(omitted, '4', 'C')).omittedColumns).toEqual([])
  })

  it('stay on corners, re-entrant ones too, and are none outside the outline', () => {
    expect(toggleColumn(officePlate(), '1', 'A')).toHaveProperty('refusal', expect.stringContaining('corner'))
    expect(toggleColumn(schoolPlate(), '4', 'D')).toHaveProperty('refusal', expect.stringContaining('corner'))
    expect(toggleColumn(schoolPlate(), '7', 'F')).toHaveProperty('refusal', expect.stringContaining('outside the outline'))
  })
})

describe('line loads', () => {
  it('run along x or y and have a length', () => {
    const plate = officePlate()
    expect(addLineLoad(plate, { from: [0, 0], to: [9000, 7500] })).toHaveProperty('refusal')
    expect(addLineLoad(plate, { from: [0, 0], to: [0, 0] })).toHaveProperty('refusal')
    const added = done(plate, addLineLoad(plate, { from: [0, 7500], to: [9000, 7500] }))
    expect(setLineLoad(added, 1, { on: { from: [0, 0], to: [9000, 7500] } })).toHaveProperty('refusal')
    expect(done(added, setLineLoad(added, 1, { permanent: 7 })).lineLoads[1]).toMatchObject({ permanent: 7, variable: 0 })
  })
})

describe('the slab and the loads', () => {
  it('keeps the finishes when another slab lies under them, in zones as well', () => {
    const plate = officePlate()
    const planks = done(plate, setSlab(plate, { ...plate.slab, system: 'planks', name: 'Planks', depth: 275, weight: 4.7, maxSpan: 8500 }))
    expect(planks.floorLoad.permanent).toBe(5.55)
    expect(finishesOf(planks)).toBe(0.85)
    expect(planks.zones[0]?.permanent).toBe(5.2)
  })

  it('leaves a zone with a slab of its own alone', () => {
    const own = officePlate()
    const plate = officePlate({ zones: own.zones.map(zone => ({ ...zone, slab: own.slab })) })
    const planks = done(plate, setSlab(plate, { ...plate.slab, weight: 4.7 }))
    expect(planks.zones[0]?.permanent).toBe(3.25)
  })

  it('adds finishes to the slab, and asks for its weight where there is none', () => {
    const plate = officePlate()
    expect(done(plate, setFinishes(plate, 1.2)).floorLoad.permanent).toBe(3.95)
    const { weight: _, ...light } = plate.slab
    expect(setFinishes(officePlate({ slab: light }), 1)).toHaveProperty('refusal')
  })

  it('takes a roof off as if it had never been there', () => {
    const plate = officePlate()
    const roofed = done(plate, setRoof(plate, { permanent: 4, variable: 0.75 }))
    expect(done(roofed, setRoof(roofed, undefined))).toEqual(plate)
  })

  it('says within which bounds a measure lies', () => {
    expect(setMeasure(officePlate(), 'storeyHeight', 900)).toEqual({ refusal: 'The storey height is a whole number from 1000 to 50000 mm.' })
  })
})

describe('outline edges', () => {
  it('move across themselves with right angles kept', () => {
    const plate = schoolPlate()
    const moved = done(plate, moveOutlineEdge(plate, 'x', 3, 22000))
    expect(moved.outline).toEqual([[0, 0], [57600, 0], [57600, 18000], [22000, 18000], [22000, 39600], [0, 39600]])
    expect(moveOutlineEdge(plate, 'y', 2, 0)).toHaveProperty('refusal')
  })
})
