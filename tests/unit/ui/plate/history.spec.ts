import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Plate } from '#shared/schemas/plate'
import { setFinishes, setMeasure, setRoof, setSlab } from '~~/app/utils/plate/building'
import { addArea, placeArea, removeArea, renameArea, toggleColumn } from '~~/app/utils/plate/elements'
import { addGridLine, moveGridLine, removeGridLine, setBays, setLabel } from '~~/app/utils/plate/grid'
import { emptyHistory, HISTORY_LIMIT, record, stepBack, stepForward, type History } from '~~/app/utils/plate/history'
import { applyPatch, patchBetween, type Outcome } from '~~/app/utils/plate/steps'
import { officePlate } from './plates'

type Intent = (plate: Plate) => Outcome

const anyIntent: fc.Arbitrary<Intent> = fc.oneof(
  fc.tuple(fc.nat(9), fc.integer({ min: -9000, max: 63000 })).map(([i, at]): Intent => plate => moveGridLine(plate, 'x', i, at)),
  fc.integer({ min: -9000, max: 63000 }).map((at): Intent => plate => addGridLine(plate, 'y', at)),
  fc.nat(9).map((i): Intent => plate => removeGridLine(plate, 'x', i)),
  fc.array(fc.integer({ min: 3000, max: 9000 }), { minLength: 1, maxLength: 8 }).map((bays): Intent => plate => setBays(plate, 'x', bays)),
  fc.tuple(fc.nat(5), fc.constantFrom('1', 'W', '7a')).map(([i, label]): Intent => plate => setLabel(plate, 'x', i, label)),
  fc.nat(40000).map((x): Intent => plate => addArea(plate, 'voids', { x, y: x / 2 | 0, width: 2600, height: 5200 })),
  fc.nat(3).map((i): Intent => plate => removeArea(plate, 'voids', i)),
  fc.tuple(fc.nat(3), fc.nat(9000)).map(([i, x]): Intent => plate => placeArea(plate, 'zones', i, { x })),
  fc.nat(3).map((i): Intent => plate => renameArea(plate, 'voids', i, 'Stair')),
  fc.constant<Intent>(plate => toggleColumn(plate, '4', 'C')),
  fc.nat(4).map((roof): Intent => plate => setRoof(plate, roof ? { permanent: roof, variable: 0.75 } : undefined)),
  fc.nat(4).map((weight): Intent => plate => setSlab(plate, { ...plate.slab, weight: weight + 0.35 })),
  fc.nat(4).map((finishes): Intent => plate => setFinishes(plate, finishes)),
  fc.nat(8).map((storeys): Intent => plate => setMeasure(plate, 'storeys', storeys)),
)

describe('history', () => {
  it('goes back to the first document and forward to the last, step by step', () => {
    fc.assert(fc.property(fc.array(anyIntent, { minLength: 1, maxLength: 60 }), (intents) => {
      const first = officePlate({ lineLoads: [{ name: 'Wall', on: { void: 'Core east' }, permanent: 3, variable: 0 }] })
      let plate = first
      let history: History = emptyHistory
      const documents = [JSON.stringify(first)]
      for (const intent of intents) {
        const outcome = intent(plate)
        if ('refusal' in outcome) continue
        const after = applyPatch(plate, outcome.patch)
        history = record(history, { label: outcome.label, patch: outcome.patch, inverse: after.inverse })
        plate = after.plate
        documents.push(JSON.stringify(plate))
      }
      for (let i = documents.length - 2; i >= 0; i--) {
        const step = stepBack(history)
        expect(step).not.toBeNull()
        if (!step) return
        plate = applyPatch(plate, step.entry.inverse).plate
        history = step.history
        expect(plate).toEqual(JSON.parse(documents[i] ?? ''))
      }
      expect(stepBack(history)).toBeNull()
      for (const document of documents.slice(1)) {
        const step = stepForward(history)
        if (!step) throw new Error('a step is missing')
        plate = applyPatch(plate, step.entry.patch).plate
        history = step.history
        expect(plate).toEqual(JSON.parse(document))
      }
    }), { numRuns: 60 })
  })

  it('keeps at least 200 steps and forgets the undone ones after a new step', () => {
    expect(HISTORY_LIMIT).toBeGreaterThanOrEqual(200)
    let history: History = emptyHistory
    for (let i = 0; i < HISTORY_LIMIT + 10; i++) {
      history = record(history, { label: String(i), patch: { storeys: i + 1 }, inverse: { storeys: i } })
    }
    expect(history.done).toHaveLength(HISTORY_LIMIT)
    expect(history.done[0]?.label).toBe('10')
    const back = stepBack(history)
    if (!back) throw new Error('a step is missing')
    expect(back.history.undone).toHaveLength(1)
    expect(record(back.history, { label: 'new', patch: {}, inverse: {} }).undone).toHaveLength(0)
  })
})

describe('a patch', () => {
  it('takes an optional field out and puts it back', () => {
    const plate = officePlate({ roof: { permanent: 4, variable: 0.75 } })
    const after = applyPatch(plate, { roof: undefined })
    expect('roof' in after.plate).toBe(false)
    expect(applyPatch(after.plate, after.inverse).plate).toEqual(plate)
  })

  it('between two documents names only the fields that differ', () => {
    const from = officePlate({ roof: { permanent: 4, variable: 0.75 } })
    const to = officePlate({ storeys: 5 })
    expect(patchBetween(from, to)).toEqual({ storeys: 5, roof: undefined })
  })
})
