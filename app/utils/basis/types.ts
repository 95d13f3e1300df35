import type { ChoiceValueName, NationalChoice, ValueSource } from '#shared/engine/actions'
import type { Basis } from '#shared/schemas/basis'
import type { Plate } from '#shared/schemas/plate'
import type { ProjectAction } from '#shared/utils/permissions'

export type QuantityValue = string | number | boolean | string[] | null

export interface NumberControl {
  kind: 'number'
  unit?: string
  prefix?: string
  decimals?: number
  min: number
  max: number
  /** What is shown is the stored value times it (0.1 → 10 %). */
  factor?: number
  whole?: boolean
  /** What stands for no value; without it one is required. */
  none?: string
}
interface ChoiceControl { kind: 'choice', options: { value: string, label: string }[] }
/** `stated`: follows from the national choice and is not set by itself. */
interface PlainControl { kind: 'families' | 'stated' }
export type Control = NumberControl | ChoiceControl | PlainControl

export const GROUPS = ['National choices', 'Actions', 'Members', 'Serviceability', 'Construction', 'Storeys, columns', 'Allowances'] as const
export type Group = typeof GROUPS[number]

/** One line of the basis of design. */
export interface Quantity {
  id: string
  group: Group
  label: string
  /** Formula markup. */
  symbol?: string
  control: Control
  action: ProjectAction
  read: (basis: Basis, choice: NationalChoice) => QuantityValue
  write: (basis: Basis, value: QuantityValue, choice: NationalChoice) => Basis
  /** The default under a national choice. */
  byDefault: (choice: NationalChoice) => QuantityValue
  source: (choice: NationalChoice) => ValueSource | string
  /** What it is, in one or two sentences. */
  why: string
  /** What it does to the first plate: lines of name, value. */
  effect?: (basis: Basis, choice: NationalChoice, plate: Plate | null) => [string, string][]
}

export type { ChoiceValueName }
