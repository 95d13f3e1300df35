import { isDeepStrictEqual } from 'node:util'
import type { Basis } from '#shared/schemas/basis'
import type { Plate } from '#shared/schemas/plate'

const withoutConstraints = (plate: Plate) => ({
  ...plate,
  keepClear: [],
  gridX: plate.gridX.map(line => ({ ...line, pinned: false })),
  gridY: plate.gridY.map(line => ({ ...line, pinned: false })),
})

/** Whether two plates differ in keep-clear zones and pinned lines only. */
export function changesConstraintsOnly(before: Plate, after: Plate): boolean {
  return isDeepStrictEqual(withoutConstraints(before), withoutConstraints(after))
}

const withoutAllowances = (basis: Basis) => ({ ...basis, connectionAllowance: 0, bracingAllowance: 0 })

/** Whether two bases differ in the allowances for connections and bracing only. */
export function changesAllowancesOnly(before: Basis, after: Basis): boolean {
  return isDeepStrictEqual(withoutAllowances(before), withoutAllowances(after))
}
