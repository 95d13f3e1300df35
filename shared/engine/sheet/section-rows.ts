import { CLASS_LIMITS, epsilon, flangeClass, flangeOutstand, webClassInBending, webStraightDepth } from '../ec3'
import type { NationalChoice } from '../actions'
import type { SectionClass } from '../ec3'
import type { Grade } from '../materials'
import type { Section } from '../sections'
import type { Basics } from './basics'
import { num, quantity, row } from './format'
import type { SheetGroup, SheetProperty, SheetRow } from './types'

export function classRow(check: string, symbol: string, c: number, t: number, sectionClass: number, limits: readonly number[], eps: number) {
  const limit = sectionClass <= 3 ? limits[sectionClass - 1]! : limits[2]!
  return row({
    clause: 'Table 5.2',
    check,
    expression: symbol,
    substituted: `${num(c, 2)} / ${num(t, 1)} = ${num(c / t, 2)}`,
    effect: `class ${sectionClass}`,
    resistance: `${sectionClass === 4 ? '> ' : ''}${limit}ε = ${num(limit * eps, 2)}`,
  })
}

export function yieldRow(section: Section, grade: Grade, fy: number, { yieldRule }: NationalChoice): SheetRow {
  const isTable = yieldRule === 'en-1993'
  return row({
    clause: isTable ? 'Table 3.1' : '3.2.1',
    check: 'Yield strength',
    expression: 'f_{y}',
    substituted: `${grade}, thickest element ${num(Math.max(section.tf, section.tw), 1)} mm, by ${isTable ? 'EN 1993-1-1' : 'the product standard'}`,
    effect: `ε = √(235 / ${num(fy, 0)}) = ${num(epsilon(fy), 4)}`,
    resistance: quantity(fy, 'N/mm²', 0),
  })
}

/** Yield strength and classification. */
export function sectionGroup({ section, grade, resistances: { fy }, rules }: Basics): SheetGroup {
  const eps = epsilon(fy)
  return {
    title: 'Section',
    rows: [
      yieldRow(section, grade, fy, rules.choice),
      classRow('Flange in compression', 'c_{f} / t_{f}', flangeOutstand(section), section.tf, flangeClass(section, fy), CLASS_LIMITS.outstandFlange, eps),
      classRow('Web in bending', 'c_{w} / t_{w}', webStraightDepth(section), section.tw, webClassInBending(section, fy), CLASS_LIMITS.webInBending, eps),
    ],
  }
}

/** The section's table. */
export function sectionProperties(section: Section, fy: number, sectionClass: SectionClass): SheetProperty[] {
  return [
    { symbol: 'm', quantity: quantity(section.mass, 'kg/m', 1) },
    { symbol: 'A', quantity: quantity(section.A / 100, 'cm²', 2) },
    { symbol: 'I_{y}', quantity: quantity(section.Iy / 1e4, 'cm⁴', 0) },
    { symbol: 'I_{z}', quantity: quantity(section.Iz / 1e4, 'cm⁴', 1) },
    { symbol: 'W_{pl,y}', quantity: quantity(section.WplY / 1e3, 'cm³', 1) },
    { symbol: 'W_{el,y}', quantity: quantity(section.WelY / 1e3, 'cm³', 1) },
    { symbol: 'i_{z}', quantity: quantity(section.iz, 'mm', 1) },
    { symbol: 'I_{t}', quantity: quantity(section.It / 1e4, 'cm⁴', 2) },
    { symbol: 'I_{w}', quantity: quantity(section.Iw / 1e9, '10³ cm⁶', 1) },
    { symbol: 'f_{y}', quantity: quantity(fy, 'N/mm²', 0) },
    { symbol: 'class', quantity: quantity(sectionClass, '', 0) },
  ]
}
