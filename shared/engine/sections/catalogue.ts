import { DIMENSIONS } from './dimensions'
import { sectionProperties } from './properties'
import type { Family, Section } from './types'

export const FAMILIES: readonly Family[] = ['UB', 'UC', 'IPE', 'IPE A', 'HEAA', 'HEA', 'HEB', 'HEM']

function buildCatalogue(): Section[] {
  const sections: Section[] = []
  for (const [family, rows] of DIMENSIONS) {
    for (const [designation, mass, h, b, tw, tf, r] of rows) {
      sections.push(Object.freeze(sectionProperties({ family, designation, mass, h, b, tw, tf, r }, sections.length)))
    }
  }
  return sections
}

/** The 285 rolled sections of EN 10365:2017 that are offered, in catalogue order. */
export const CATALOGUE: readonly Section[] = Object.freeze(buildCatalogue())

const BY_DESIGNATION = new Map(CATALOGUE.map(section => [section.designation, section]))

/** The section of that designation ("UB 457x191x67"), or undefined. */
export function findSection(designation: string): Section | undefined {
  return BY_DESIGNATION.get(designation)
}

/** Order of choice: lighter, then shallower, then catalogue order. */
export function compareSections(a: Section, b: Section): number {
  return a.mass - b.mass || a.h - b.h || a.catalogueIndex - b.catalogueIndex
}

/** All sections of the families, in the order of choice. */
export function sectionsOf(families: readonly Family[]): Section[] {
  return CATALOGUE.filter(section => families.includes(section.family)).sort(compareSections)
}
