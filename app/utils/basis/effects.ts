/** What a value of the basis does to the first plate of the project, by the engine's own functions. */
import { areaReduction, combinationFactors, psi, storeyReduction, type NationalChoice } from '#shared/engine/actions'
import { yieldStrength } from '#shared/engine/materials'
import { sectionsOf } from '#shared/engine/sections'
import type { Basis, MemberBasis } from '#shared/schemas/basis'
import type { Plate } from '#shared/schemas/plate'
import { formatNumber, formatPercent, formatQuantity } from '#shared/utils/format'

type Lines = [string, string][]

/** Design load of the floor under each combination, kN/m², and 6.10ab against 6.10. */
export function combinationEffect(basis: Basis, choice: NationalChoice, plate: Plate | null): Lines {
  if (!plate) return []
  const { permanent, variable, category } = plate.floorLoad
  const { psi0 } = psi(choice, category)
  const loads = [...combinationFactors(choice, '6.10'), ...combinationFactors(choice, '6.10ab')].map(factors => ({
    name: factors.name,
    load: factors.permanent * permanent + factors.variable * variable + factors.accompanying * psi0 * variable,
  }))
  const [single, a, b] = loads.map(({ load }) => load) as [number, number, number]
  const inForce = (name: string) => name === basis.combination || (basis.combination === '6.10ab' && name !== '6.10')
  return [
    ...loads.map(({ name, load }): [string, string] => [`${name}${inForce(name) ? ', in force' : ''}`, formatQuantity(load, 'kN/m²', 2)]),
    ['Worse of a and b against 6.10', formatPercent(Math.max(a, b) / single - 1)],
  ]
}

export function psiEffect(_: Basis, choice: NationalChoice, plate: Plate | null): Lines {
  if (!plate) return []
  const { psi0, psi1, psi2 } = psi(choice, plate.floorLoad.category)
  return [[`Category ${plate.floorLoad.category}, ψ0 · ψ1 · ψ2`, [psi0, psi1, psi2].map(value => formatNumber(value, 1)).join(' · ')]]
}

/** αA for one bay and αn for the lowest column of the plate. */
export function reductionEffect(_: Basis, choice: NationalChoice, plate: Plate | null): Lines {
  if (!plate) return []
  const { category } = plate.floorLoad
  const bay = largestBay(plate.gridX) * largestBay(plate.gridY) / 1e6
  return [
    [`Bay of ${formatQuantity(bay, 'm²', 1)}, αA`, formatNumber(areaReduction(choice, category, bay), 3)],
    [`${plate.storeys} storeys, αn`, formatNumber(storeyReduction(choice, category, plate.storeys), 3)],
  ]
}

export function largestBay(lines: Plate['gridX']): number {
  const at = lines.map(line => line.at).sort((a, b) => a - b)
  return Math.max(0, ...at.slice(1).map((value, i) => value - (at[i] ?? value)))
}

/** The allowed deflection on the longest bay either way, mm. */
export function deflectionEffect(ratio: number | null, plate: Plate | null): Lines {
  if (!plate || ratio === null) return []
  const spans = [...new Set([largestBay(plate.gridX), largestBay(plate.gridY)])]
  return spans.map(span => [`On ${formatQuantity(span / 1000, 'm', 2)}`, formatQuantity(span / ratio, 'mm', 1)])
}

export function yieldEffect(member: MemberBasis, choice: NationalChoice): Lines {
  return [16, 40, 63].map(thickness => [
    `Up to ${thickness}\u00A0mm`,
    formatQuantity(yieldStrength(member.grade, thickness, choice.yieldRule), 'N/mm²'),
  ])
}

export function familyEffect(member: MemberBasis): Lines {
  const sections = sectionsOf(member.families)
  const depths = sections.map(section => section.h)
  return [
    ['Sections to choose from', formatNumber(sections.length)],
    ['Depth', `${formatNumber(Math.min(...depths))} to ${formatQuantity(Math.max(...depths), 'mm')}`],
    ['Mass', `${formatNumber(sections[0]?.mass, 1)} to ${formatQuantity(sections.at(-1)?.mass, 'kg/m', 1)}`],
  ]
}

/** Buckling curves by h/b of the method in force. */
export function ltbEffect(basis: Basis, choice: NationalChoice): Lines {
  const rules = basis.ltbMethod === '6.3.2.3' ? choice.ltb.rolled : choice.ltb.general
  let from = 0
  const bands = rules.curves.map(({ upTo, curve }): [string, string] => {
    const text = upTo === null ? `h/b over ${from}` : from === 0 ? `h/b up to ${upTo}` : `h/b over ${from} to ${upTo}`
    from = upTo ?? from
    return [text, `curve ${curve}`]
  })
  return [['Plateau to slenderness', formatNumber(rules.plateau, 2)], ...bands]
}
