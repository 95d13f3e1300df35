/** The lines of the basis of design: what each is, its default under a national choice and where that comes from. */
import type { ChoiceValueName, NationalChoice } from '#shared/engine/actions'
import type { Basis, MemberBasis } from '#shared/schemas/basis'
import { GRADES } from '#shared/schemas/basis'
import { DEFAULT_BASIS } from '#shared/utils/defaultBasis'
import { combinationEffect, deflectionEffect, familyEffect, ltbEffect, psiEffect, reductionEffect, yieldEffect } from './effects'
import type { Control, Group, Quantity, QuantityValue } from './types'

const PRACTICE = 'Common practice, no source'

const option = (value: string, label: string) => ({ value, label })
const onOff = (on: string, off: string): Control => ({ kind: 'choice', options: [option('yes', on), option('no', off)] })

type OverrideName = keyof Basis['overrides']

/** A factor of the national choice that the basis may set in its place. */
function factor(
  id: OverrideName, group: Group, label: string, symbol: string, limits: { min: number, max: number, decimals: number },
  why: string, effect?: Quantity['effect'],
): Quantity {
  return {
    id, group, label, symbol, why, effect, action: 'basis.edit',
    control: { kind: 'number', ...limits },
    read: (basis, choice) => basis.overrides[id] ?? choice[id],
    write: (basis, value, choice) => {
      const overrides = { ...basis.overrides }
      if (typeof value !== 'number' || value === choice[id]) Reflect.deleteProperty(overrides, id)
      else overrides[id] = value
      return { ...basis, overrides }
    },
    byDefault: choice => choice[id],
    source: choice => choice.sources[id],
  }
}

/** A value that follows from the national choice. */
function stated(id: ChoiceValueName, group: Group, label: string, symbol: string, text: (choice: NationalChoice) => string, why: string, effect?: Quantity['effect']): Quantity {
  return {
    id, group, label, symbol, why, effect, action: 'basis.edit', control: { kind: 'stated' },
    read: (_, choice) => text(choice), write: basis => basis, byDefault: text, source: choice => choice.sources[id],
  }
}

interface Plain {
  id: string
  group: Group
  label: string
  symbol?: string
  control: Control
  source: Quantity['source'] | string
  why: string
  action?: Quantity['action']
  effect?: Quantity['effect']
  byDefault?: Quantity['byDefault']
  read: (basis: Basis) => QuantityValue
  write: (basis: Basis, value: QuantityValue) => Basis
}

/** A value of the basis with the default document's value as its default. */
function plain({ source, byDefault, action = 'basis.edit', ...rest }: Plain): Quantity {
  return {
    ...rest, action,
    byDefault: byDefault ?? (() => rest.read(DEFAULT_BASIS)),
    source: typeof source === 'string' ? () => source : source,
  }
}

const yesNo = (value: boolean): QuantityValue => value ? 'yes' : 'no'
const figure = (value: QuantityValue) => typeof value === 'number' ? value : null

function limit(id: 'variable' | 'total' | 'frequency' | 'floorFrequency', rest: Omit<Plain, 'id' | 'group' | 'read' | 'write'>): Quantity {
  return plain({
    ...rest, id: `limits.${id}`, group: 'Serviceability',
    read: basis => basis.limits[id],
    write: (basis, value) => ({ ...basis, limits: { ...basis.limits, [id]: figure(value) } }),
  })
}

function advisory(choice: NationalChoice, load: 'variable' | 'total', otherwise: number | null): number | null {
  const advice = choice.deflection.filter(limits => limits.load === load)
  return (advice.find(limits => limits.what.includes('brittle')) ?? advice[0])?.ratio ?? otherwise
}

const KINDS = [['secondary', 'Secondary beams'], ['primary', 'Primary beams'], ['column', 'Columns']] as const

function memberRows([kind, name]: typeof KINDS[number]): Quantity[] {
  const set = (basis: Basis, change: Partial<MemberBasis>): Basis => ({ ...basis, [kind]: { ...basis[kind], ...change } })
  return [
    plain({
      id: `${kind}.grade`, group: 'Members', label: `${name}, grade`, source: PRACTICE,
      control: { kind: 'choice', options: GRADES.map(grade => option(grade, grade)) },
      read: basis => basis[kind].grade,
      write: (basis, value) => set(basis, { grade: value as MemberBasis['grade'] }),
      why: 'The yield strength follows from the grade and the thickest element of the section.',
      effect: (basis, choice) => yieldEffect(basis[kind], choice),
    }),
    plain({
      id: `${kind}.families`, group: 'Members', label: `${name}, families`, source: `EN 10365:2017; the choice of families: ${PRACTICE.toLowerCase()}`,
      control: { kind: 'families' },
      read: basis => basis[kind].families,
      write: (basis, value) => set(basis, { families: value as MemberBasis['families'] }),
      why: kind === 'column'
        ? 'Columns are chosen from these families, the lightest that passes.'
        : 'Every section of these families is tried; edge beams and trimmers take the families of the beams that they are parallel to.',
      effect: basis => familyEffect(basis[kind]),
    }),
  ]
}

const NATIONAL: Quantity[] = [
  factor('gammaM0', 'National choices', 'Partial factor, resistance of sections', 'γ_{M0}', { min: 0.5, max: 2, decimals: 2 },
    'Divides the yield strength in bending and shear.'),
  factor('gammaM1', 'National choices', 'Partial factor, stability', 'γ_{M1}', { min: 0.5, max: 2, decimals: 2 },
    'Divides the yield strength in lateral-torsional and flexural buckling.'),
  stated('yieldRule', 'National choices', 'Yield strength', 'f_{y}',
    choice => choice.yieldRule === 'product-standard' ? 'Product standard' : 'EN 1993-1-1, Table 3.1',
    'Which table gives the yield strength by thickness.', (basis, choice) => yieldEffect(basis.primary, choice)),
  factor('eta', 'National choices', 'Shear area factor', 'η', { min: 1, max: 1.2, decimals: 2 },
    'Least shear area, and where the web buckles in shear before it yields.'),
  stated('kcRule', 'National choices', 'Moment shape factor', 'k_{c}',
    choice => choice.ltb.kcRule === 'table-6.6' ? 'Table 6.6' : '1 / √C1',
    'Counts only where the factor f is used.'),
]

const ACTIONS: Quantity[] = [
  plain({
    id: 'combination', group: 'Actions', label: 'Combination',
    control: { kind: 'choice', options: [option('6.10', '6.10'), option('6.10ab', '6.10a and 6.10b')] },
    read: basis => basis.combination,
    write: (basis, value) => ({ ...basis, combination: value as Basis['combination'] }),
    byDefault: choice => choice.combinations[0] ?? '6.10',
    source: choice => choice.sources.combinations,
    why: '6.10 sets one pair of factors for all actions. 6.10a and 6.10b together are usually less severe; every check is made under both and the worse counts.',
    effect: combinationEffect,
  }),
  factor('gammaG', 'Actions', 'Factor, permanent load', 'γ_{G}', { min: 0.5, max: 2, decimals: 2 }, 'Unfavourable permanent load; favourable permanent load counts 1.0.', combinationEffect),
  factor('gammaQ', 'Actions', 'Factor, variable load', 'γ_{Q}', { min: 0.5, max: 2.5, decimals: 2 }, 'All imposed loads of a floor are one action.', combinationEffect),
  factor('xi', 'Actions', 'Reduction of permanent load in 6.10b', 'ξ', { min: 0.5, max: 1, decimals: 3 }, 'Counts only under 6.10a and 6.10b. ξ times γG is not rounded.', combinationEffect),
  stated('psi', 'Actions', 'Factors ψ of the imposed load', 'ψ_{0}, ψ_{1}, ψ_{2}', () => 'by category', 'Accompanying, frequent and quasi-permanent value, by the category of use.', psiEffect),
  plain({
    id: 'reductions', group: 'Actions', label: 'Reduction for area or storeys', symbol: 'α_{A}, α_{n}',
    control: { kind: 'choice', options: [option('none', 'None'), option('area', 'Area, beams and columns'), option('storeys', 'Storeys, columns'), option('both', 'Area in beams, storeys in columns')] },
    read: ({ reductions }) => reductions.area ? (reductions.storeys ? 'both' : 'area') : reductions.storeys ? 'storeys' : 'none',
    write: (basis, value) => ({ ...basis, reductions: { area: value === 'area' || value === 'both', storeys: value === 'storeys' || value === 'both' } }),
    source: choice => ({ ...choice.sources.areaReduction, source: `Off until chosen. ${choice.sources.areaReduction.source}` }),
    why: 'Imposed load may be reduced for a large loaded area or for many storeys above a column, never both on one element.',
    effect: reductionEffect,
  }),
]

const METHODS: Quantity[] = [
  plain({
    id: 'ltbMethod', group: 'Members', label: 'Lateral-torsional buckling', symbol: 'χ_{LT}',
    control: { kind: 'choice', options: [option('6.3.2.3', '6.3.2.3, rolled'), option('6.3.2.2', '6.3.2.2, general')] },
    read: basis => basis.ltbMethod,
    write: (basis, value) => ({ ...basis, ltbMethod: value as Basis['ltbMethod'] }),
    source: choice => choice.sources.ltbRolled,
    why: 'The method can change which scheme is lightest; it stands beside every ranking.',
    effect: ltbEffect,
  }),
  plain({
    id: 'criticalMoment', group: 'Members', label: 'Elastic critical moment', symbol: 'M_{cr}',
    control: { kind: 'choice', options: [option('by-segment', 'By segment'), option('whole-beam', 'Whole beam')] },
    read: basis => basis.criticalMoment,
    write: (basis, value) => ({ ...basis, criticalMoment: value as Basis['criticalMoment'] }),
    source: 'As a checker does it by hand, each piece between restraints alone; no clause',
    why: 'By segment takes each piece between restraints alone with fork ends. The whole beam lets the pieces help each other: higher for equal pieces with two or more restraints.',
  }),
  plain({
    id: 'useF', group: 'Members', label: 'Factor for the moment shape', symbol: 'f',
    control: onOff('Used', 'Off'), read: basis => yesNo(basis.useF),
    write: (basis, value) => ({ ...basis, useF: value === 'yes' }),
    source: 'EN 1993-1-1:2005 6.3.2.3(2), expression (6.58), optional',
    why: 'Raises the reduction factor for moments that are not uniform between restraints. Counts only with 6.3.2.3.',
  }),
  plain({
    id: 'utilisationLimit', group: 'Members', label: 'Largest utilisation', source: `EN 1993-1-1 6.1; less than 1.00: ${PRACTICE.toLowerCase()}`,
    control: { kind: 'number', decimals: 2, min: 0.1, max: 1 },
    read: basis => basis.utilisationLimit, write: (basis, value) => ({ ...basis, utilisationLimit: figure(value) ?? 1 }),
    why: 'A reserve for growth: a section counts as passing up to this utilisation.',
  }),
  plain({
    id: 'minSecondarySpacing', group: 'Members', label: 'Least spacing of secondary beams', source: PRACTICE,
    control: { kind: 'number', unit: 'm', decimals: 2, min: 0, max: 20_000, factor: 1 / 1000, none: 'none' },
    read: basis => basis.minSecondarySpacing, write: (basis, value) => ({ ...basis, minSecondarySpacing: figure(value) }),
    why: 'Arrangements with secondary beams nearer than this are left out with that reason.',
  }),
  plain({
    id: 'trimDistance', group: 'Members', label: 'Trimming by a beam beside a void', source: PRACTICE,
    control: { kind: 'number', unit: 'mm', min: 0, max: 2000, whole: true },
    read: basis => basis.trimDistance, write: (basis, value) => ({ ...basis, trimDistance: figure(value) ?? 0 }),
    why: 'A beam line this far outside a void’s edge still trims it; farther away the edge gets a trimmer of its own.',
  }),
]

const SERVICE: Quantity[] = [
  limit('variable', {
    label: 'Deflection, variable load', control: { kind: 'number', prefix: 'span /', min: 50, max: 5000, none: 'no limit' },
    byDefault: choice => advisory(choice, 'variable', DEFAULT_BASIS.limits.variable),
    source: choice => choice.deflection.length ? choice.sources.deflection : PRACTICE,
    why: 'Characteristic combination, at the place of the largest deflection. Stricter under brittle finishes.',
    effect: (basis, _, plate) => deflectionEffect(basis.limits.variable, plate),
  }),
  limit('total', {
    label: 'Deflection, total', control: { kind: 'number', prefix: 'span /', min: 50, max: 5000, none: 'no limit' },
    byDefault: choice => advisory(choice, 'total', DEFAULT_BASIS.limits.total),
    source: choice => choice.deflection.some(({ load }) => load === 'total') ? choice.sources.deflection : PRACTICE,
    why: 'Permanent and variable load with the steel’s own weight, without camber.',
    effect: (basis, _, plate) => deflectionEffect(basis.limits.total, plate),
  }),
  limit('frequency', {
    label: 'Frequency, each beam alone', symbol: 'f_{1}', control: { kind: 'number', prefix: '≥', unit: 'Hz', decimals: 1, min: 0.1, max: 50, none: 'no limit' },
    source: PRACTICE, why: 'By 18 / √δ, with δ in mm under permanent load and a share of the variable load. A filter, no proof of the floor’s response.',
  }),
  limit('floorFrequency', {
    label: 'Frequency, floor', symbol: 'f_{1}', control: { kind: 'number', prefix: '≥', unit: 'Hz', decimals: 1, min: 0.1, max: 50, none: 'no limit' },
    source: PRACTICE, why: 'The same with the deflections of the secondary and the primary beam of a bay added.',
  }),
  plain({
    id: 'limits.variableShare', group: 'Serviceability', label: 'Variable load that vibrates', source: PRACTICE,
    control: { kind: 'number', unit: '%', min: 0, max: 1, factor: 100 },
    read: basis => basis.limits.variableShare, write: (basis, value) => ({ ...basis, limits: { ...basis.limits, variableShare: figure(value) ?? 0 } }),
    why: 'The share of the variable load that counts with the permanent load in the frequency.',
  }),
]

const CONSTRUCTION: Quantity[] = [
  plain({
    id: 'constructionStage', group: 'Construction', label: 'Construction stage', source: 'EN 1991-1-6 4.11.2; the heap of 10 % in 3 × 3 m is left out',
    control: onOff('Checked', 'Not checked'), read: basis => yesNo(basis.constructionStage),
    write: (basis, value) => ({ ...basis, constructionStage: value === 'yes' }),
    why: 'Weight on the beams before the slab is stiff, 1 kN/m³ more for wet concrete and 0.75 kN/m², with the restraint of that stage. Needs the weight of the slab on the plate.',
  }),
  plain({
    id: 'buildability.secondaryNotDeeper', group: 'Construction', label: 'Secondary not deeper than primary', source: PRACTICE,
    control: onOff('Asked', 'Not asked'), read: basis => yesNo(basis.buildability.secondaryNotDeeper),
    write: (basis, value) => ({ ...basis, buildability: { ...basis.buildability, secondaryNotDeeper: value === 'yes' } }),
    why: 'Met at the least total mass of the beams that meet, not one member after the other.',
  }),
  plain({
    id: 'buildability.minFlangeWidth', group: 'Construction', label: 'Least flange under the slab', symbol: 'b', source: `${PRACTICE}: deck 120, planks 180 with planks on both sides`,
    control: { kind: 'number', unit: 'mm', min: 0, max: 1000, none: 'none' },
    read: basis => basis.buildability.minFlangeWidth, write: (basis, value) => ({ ...basis, buildability: { ...basis.buildability, minFlangeWidth: figure(value) } }),
    why: 'Bearing for slab on both sides; 30 mm less where it bears on one side only.',
  }),
  plain({
    id: 'buildability.maxPiece', group: 'Construction', label: 'Longest piece', source: `${PRACTICE}: warned over 15 m, limit 18 m`,
    control: { kind: 'number', unit: 'm', decimals: 2, min: 1000, max: 100_000, factor: 1 / 1000, none: 'none' },
    read: basis => basis.buildability.maxPiece, write: (basis, value) => ({ ...basis, buildability: { ...basis.buildability, maxPiece: figure(value) } }),
    why: 'Arrangements with a longer beam are left out with that reason.',
  }),
]

const ALLOWANCES: Quantity[] = [
  plain({
    id: 'liftStoreys', group: 'Storeys, columns', label: 'Storeys in one column lift', source: PRACTICE,
    control: { kind: 'number', min: 1, max: 4, whole: true },
    read: basis => basis.liftStoreys, write: (basis, value) => ({ ...basis, liftStoreys: figure(value) ?? 1 }),
    why: 'The column keeps its section over a lift; it is spliced above.',
  }),
  plain({
    id: 'connectionAllowance', group: 'Allowances', label: 'Connections', source: `${PRACTICE}: 5 to 12 % where given`, action: 'basis.edit-allowances',
    control: { kind: 'number', unit: '%', min: 0, max: 1, factor: 100 },
    read: basis => basis.connectionAllowance, write: (basis, value) => ({ ...basis, connectionAllowance: figure(value) ?? 0 }),
    why: 'Share added to the mass of beams and columns.',
  }),
  plain({
    id: 'bracingAllowance', group: 'Allowances', label: 'Bracing', source: `${PRACTICE}: 2 to 5 kg/m² where not modelled`, action: 'basis.edit-allowances',
    control: { kind: 'number', unit: 'kg/m²', decimals: 1, min: 0, max: 100 },
    read: basis => basis.bracingAllowance, write: (basis, value) => ({ ...basis, bracingAllowance: figure(value) ?? 0 }),
    why: 'Mass per slab area added for bracing, which is not designed here.',
  }),
]

export const QUANTITIES: readonly Quantity[] = [
  ...NATIONAL, ...ACTIONS, ...KINDS.flatMap(memberRows), ...METHODS, ...SERVICE, ...CONSTRUCTION, ...ALLOWANCES,
]
