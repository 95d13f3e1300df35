/** What fewer different sections cost: the lightest scheme with at most K of them, for one K or for many. */
import { HALF_A_GRAM, type Proposal } from '../selection'
import { steelMass } from '../quantities'
import { type FewSections, fewSections, listsOf, steelOf } from './fewSections'
import { type SelectionScope, listOf } from './memberGroups'
import type { PreparedStudy } from './prepare'
import { rebuildUnlimited } from './rebuild'
import type { Scheme } from './schemes'

export interface RationalisedScheme {
  /** Different sections allowed, in all or for each kind of member. */
  most: number
  /** null: so few sections cannot serve every member, or none were found that do. */
  found: {
    beamMass: number
    columnMass: number
    /** With the allowances of the basis, kg. */
    mass: number
    massPerArea: number
    depth: number
    distinctSections: number
    /** Sections by list: `plate`, or kinds of members; the lightest first. */
    sections: { list: string, designations: string[] }[]
    /** Section of every beam and of every lift of every column from the base up, in the order of the scheme's members. */
    beams: string[]
    columns: string[][]
  } | null
  /** `optimal`: the bound proves it; `best-found`: by at most `gap` kg; `impossible`: proved; `not-found`: nothing proved. */
  status: 'optimal' | 'best-found' | 'impossible' | 'not-found'
  /** No such scheme is lighter, kg with allowances; null where there is none. */
  bound: number | null
  /** kg with allowances */
  gap: number
  /** How often a choice was sized with its own weights. */
  rounds: number
}

export interface PriceOfRepetition {
  key: string
  scope: SelectionScope
  /** Without a limit on the number of sections. */
  free: { mass: number, massPerArea: number, distinctSections: number }
  /** Rising number of sections; never heavier with more. */
  steps: RationalisedScheme[]
}

/** Fewest and most sections of the price of repetition. */
const PRICE_FROM = 2
const PRICE_TO = 8

/**
 * The scheme of a key with at most `most` different sections.
 * @throws EngineError `unknown-reference` where the key names no scheme of the study.
 */
export function rationalise(study: PreparedStudy, key: string, most: number, scope: SelectionScope, proposal?: Proposal): RationalisedScheme {
  const free = rebuildUnlimited(study, key)
  return told(study, most, scope, fewSections(study, free, most, { scope, proposal }))
}

/** Mass against the number of different sections. A choice of fewer stands where more found nothing lighter. */
export function priceOfRepetition(
  study: PreparedStudy, key: string, scope: SelectionScope, from = PRICE_FROM, to = PRICE_TO, proposal?: Proposal,
): PriceOfRepetition {
  const free = rebuildUnlimited(study, key)
  const steps: RationalisedScheme[] = []
  let before: Scheme | null = null
  for (let most = from; most <= to; most++) {
    const own = fewSections(study, free, most, { scope, proposal })
    const step: FewSections = before && (!own.scheme || steelOf(own.scheme) > steelOf(before)) ? withScheme(own, before) : own
    before = step.scheme
    steps.push(told(study, most, scope, step))
  }
  return {
    key, scope, steps,
    free: { mass: free.mass.mass, massPerArea: free.mass.massPerArea, distinctSections: distinct(free) },
  }
}

function withScheme(own: FewSections, scheme: Scheme): FewSections {
  const bound = Math.min(own.bound, steelOf(scheme))
  return { ...own, scheme, bound, isOptimal: steelOf(scheme) - bound <= HALF_A_GRAM }
}

function distinct(scheme: Scheme): number {
  return listsOf(scheme, 'plate').get(listOf('plate', ''))?.length ?? 0
}

function told(study: PreparedStudy, most: number, scope: SelectionScope, { scheme, bound, isOptimal, rounds }: FewSections): RationalisedScheme {
  if (!scheme) return { most, found: null, status: isOptimal ? 'impossible' : 'not-found', bound: null, gap: 0, rounds }
  const { mass, sized, columns } = scheme
  const area = scheme.prepared.model.slabArea / 1e6
  const boundMass = steelMass(Math.min(bound, steelOf(scheme)), 0, area, study.input.basis).mass
  return {
    most,
    found: {
      ...mass, depth: sized.depth, distinctSections: distinct(scheme),
      sections: [...listsOf(scheme, scope)].map(([list, sections]) => ({
        list, designations: [...sections].sort((a, b) => a.mass - b.mass || a.catalogueIndex - b.catalogueIndex).map(section => section.designation),
      })),
      beams: sized.sections.map(({ section }) => section.designation),
      columns: columns.map(column => column.lifts.map(lift => lift.section.designation)),
    },
    status: isOptimal ? 'optimal' : 'best-found',
    bound: boundMass, gap: isOptimal ? 0 : Math.max(0, mass.mass - boundMass), rounds,
  }
}
