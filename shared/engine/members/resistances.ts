import type { NationalChoice } from '../actions'
import {
  bendingModulus, bendingResistance, classInBending, ltbCurve, needsShearBucklingCheck, plasticShearResistance,
  shearArea, shearBucklingResistance, webModulus,
} from '../ec3'
import type { LtbCurve, LtbMethod, SectionClass } from '../ec3'
import { E, G, GRAVITY, yieldStrength } from '../materials'
import type { Grade } from '../materials'
import type { Section } from '../sections'

/** What a section resists by itself, independent of any beam. N, mm, Nmm. */
export interface Resistances {
  section: Section
  fy: number
  sectionClass: SectionClass
  W: number
  /** Modulus that the web loses at ρ = 1. */
  Wweb: number
  McRd: number
  VplRd: number
  VbwRd: number | null
  /** The smaller of VplRd and VbwRd. */
  VRd: number
  /** Mb,Rd at χLT = 1. */
  MbRdFull: number
  EIy: number
  EIz: number
  GIt: number
  EIw: number
  /** Own weight, N/mm. */
  weight: number
  curves: Record<LtbMethod, LtbCurve>
}

/** Resistances of a section; null where the grade is not offered at its thickness. */
export function resistancesOf(section: Section, grade: Grade, choice: NationalChoice): Resistances | null {
  const fy = yieldStrength(grade, Math.max(section.tf, section.tw), choice.yieldRule)
  if (fy === null) return null
  const sectionClass = classInBending(section, fy)
  const W = bendingModulus(section, sectionClass)
  const VplRd = plasticShearResistance(shearArea(section, choice.eta), fy, choice.gammaM0)
  const VbwRd = needsShearBucklingCheck(section, fy, choice.eta)
    ? shearBucklingResistance(section, fy, choice.eta, choice.gammaM1)
    : null
  return {
    section, fy, sectionClass, W,
    Wweb: webModulus(section, sectionClass),
    McRd: bendingResistance(W, fy, choice.gammaM0),
    VplRd, VbwRd,
    VRd: VbwRd === null ? VplRd : Math.min(VplRd, VbwRd),
    MbRdFull: bendingResistance(W, fy, choice.gammaM1),
    EIy: E * section.Iy,
    EIz: E * section.Iz,
    GIt: G * section.It,
    EIw: E * section.Iw,
    weight: section.mass * GRAVITY / 1000,
    curves: { '6.3.2.3': ltbCurve(section, '6.3.2.3', choice), '6.3.2.2': ltbCurve(section, '6.3.2.2', choice) },
  }
}

type Table = (Resistances | null | undefined)[]
const tables = new WeakMap<NationalChoice, Map<Grade, Table>>()

/** The table of a choice and grade, by catalogue index; filled as sections are asked for. */
export function resistanceTable(grade: Grade, choice: NationalChoice): Table {
  let byGrade = tables.get(choice)
  if (!byGrade) tables.set(choice, byGrade = new Map())
  let table = byGrade.get(grade)
  if (!table) byGrade.set(grade, table = [])
  return table
}

/** Resistances from the table, computed once per section, grade and choice. */
export function resistancesFrom(table: Table, section: Section, grade: Grade, choice: NationalChoice): Resistances | null {
  const kept = table[section.catalogueIndex]
  if (kept === null) return null
  if (kept !== undefined && kept.section === section) return kept
  const fresh = resistancesOf(section, grade, choice)
  if (kept === undefined && section.catalogueIndex >= 0) table[section.catalogueIndex] = fresh
  return fresh
}
