/** Resistances of a column section for a pair of buckling lengths, remembered by section and lengths. */
import {
  type SectionClass, bendingModulus, classInCompression, criticalMomentUniform, flexuralBuckling, ltbCurve, ltbReduction,
  ltbResistance, ltbSlenderness,
} from '../ec3'
import { yieldStrength } from '../materials'
import type { Section } from '../sections'
import type { ColumnRules } from './types'

export interface ColumnResistance {
  sectionClass: SectionClass
  fy: number
  NbYRd: number
  NbZRd: number
  chiY: number
  chiZ: number
  lambdaY: number
  lambdaZ: number
  chiLT: number
  McyRk: number
  MbRd: number
  MczRd: number
  MczRk: number
  NplRk: number
}

export type ColumnResistances = (section: Section, LcrY: number, LcrZ: number, ltbLength: number) => ColumnResistance | null

/** null: grade not offered at that thickness, or class 4 in compression (left out of the choice). */
export function columnResistances(rules: ColumnRules): ColumnResistances {
  const known = new Map<string, ColumnResistance | null>()
  return (section, LcrY, LcrZ, ltbLength) => {
    const key = `${section.catalogueIndex}|${LcrY}|${LcrZ}|${ltbLength}`
    const found = known.get(key)
    if (found !== undefined) return found
    const resistance = resistanceOf(rules, section, LcrY, LcrZ, ltbLength)
    known.set(key, resistance)
    return resistance
  }
}

function resistanceOf(rules: ColumnRules, section: Section, LcrY: number, LcrZ: number, ltbLength: number): ColumnResistance | null {
  const { choice, grade } = rules
  const fy = yieldStrength(grade, Math.max(section.tf, section.tw), choice.yieldRule)
  if (fy === null) return null
  const sectionClass = classInCompression(section, fy)
  if (sectionClass === 4) return null
  const { gammaM0, gammaM1 } = choice
  const y = flexuralBuckling(section, grade, fy, gammaM1, LcrY, 'y')
  const z = flexuralBuckling(section, grade, fy, gammaM1, LcrZ, 'z')
  const W = bendingModulus(section, sectionClass)
  const lambdaLT = ltbSlenderness(W, fy, criticalMomentUniform(section, ltbLength))
  const chiLT = ltbReduction(lambdaLT, ltbCurve(section, rules.ltbMethod, choice))
  const Wz = sectionClass <= 2 ? section.WplZ : section.WelZ
  return {
    sectionClass, fy,
    NbYRd: y.NbRd, NbZRd: z.NbRd, chiY: y.chi, chiZ: z.chi, lambdaY: y.lambda, lambdaZ: z.lambda, chiLT,
    McyRk: W * fy, MbRd: ltbResistance(chiLT, W, fy, gammaM1), MczRd: Wz * fy / gammaM0, MczRk: Wz * fy, NplRk: section.A * fy,
  }
}
