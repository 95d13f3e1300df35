import {
  criticalMomentUniform, flexuralBuckling, kcFromC1, ltbReductionModified, ltbResistance, ltbSlenderness,
} from '../ec3'
import { halfDigit, judge } from './check'
import type { Claim } from './check'
import { resistances, section } from './common'
import type { PublishedCheck } from './types'

const SOURCE = 'British section resistance tables to Eurocode 3 with the UK National Annex, sections to BS EN 10365:2017 (2019), S355'

interface TableRow {
  designation: string
  class: number
  Mc: number
  Vc: number
  /** Mb,Rd at 3, 6 and 9 m, C1 1.13. */
  Mb: readonly [number, number, number]
  /** Nb,z,Rd at 3 and 6 m. */
  Nb?: readonly [number, number]
}

const ROWS: readonly TableRow[] = [
  { designation: 'UB 203x133x25', class: 1, Mc: 91.6, Vc: 263, Mb: [69.1, 37.4, 23.7] },
  { designation: 'UB 305x165x40', class: 1, Mc: 221, Vc: 411, Mb: [185, 103, 63.3] },
  { designation: 'UB 457x191x67', class: 1, Mc: 522, Vc: 839, Mb: [424, 231, 145] },
  { designation: 'UB 533x210x92', class: 1, Mc: 838, Vc: 1170, Mb: [715, 416, 264] },
  { designation: 'UB 610x229x101', class: 1, Mc: 1020, Vc: 1370, Mb: [894, 526, 324] },
  { designation: 'UB 686x254x125', class: 1, Mc: 1380, Vc: 1670, Mb: [1260, 799, 499] },
  { designation: 'UC 152x152x23', class: 3, Mc: 58.2, Vc: 204, Mb: [50.3, 33.2, 23.2], Nb: [524, 183] },
  { designation: 'UC 203x203x46', class: 2, Mc: 176, Vc: 347, Mb: [166, 126, 93.9], Nb: [1420, 635] },
  { designation: 'UC 254x254x73', class: 2, Mc: 352, Vc: 525, Mb: [347, 284, 225], Nb: [2580, 1420] },
  { designation: 'UC 305x305x158', class: 1, Mc: 925, Vc: 1130, Mb: [925, 844, 746], Nb: [5880, 3820] },
]

/** One unit of the last of three printed figures. */
function lastFigure(value: number): number {
  return value >= 1000 ? 10 : value >= 100 ? 1 : 0.1
}

function tolerance(expected: number, part: number) {
  const unit = lastFigure(expected)
  return {
    tolerance: Math.max(unit, part * expected),
    toleranceReason: `the print cuts figures and rounds A: one unit of the last figure or ${100 * part} %`,
  }
}

function rowChecks({ designation, class: sectionClass, Mc, Vc, Mb, Nb }: TableRow): PublishedCheck[] {
  const of = section(designation)
  const r = resistances(designation, 'S355', 'UK')
  const base = { source: `${SOURCE}, ${designation}`, standing: 'quoted' as const }
  const id = `ukt-${designation.replaceAll(' ', '-').toLowerCase()}`
  const claims: Claim[] = [
    { ...base, id: `${id}-class`, what: 'class in bending', expected: sectionClass, computed: r.sectionClass, unit: '', ...halfDigit(0) },
    { ...base, id: `${id}-mc`, what: 'Mc,y,Rd', expected: Mc, computed: r.McRd / 1e6, unit: 'kNm', ...tolerance(Mc, 0.004) },
    { ...base, id: `${id}-vc`, what: 'Vc,Rd', expected: Vc, computed: r.VplRd / 1e3, unit: 'kN', ...tolerance(Vc, 0.014) },
  ]
  Mb.forEach((expected, i) => {
    const L = 3000 * (i + 1)
    const Mcr = 1.13 * criticalMomentUniform(of, L)
    const chi = ltbReductionModified(ltbSlenderness(r.W, r.fy, Mcr), r.curves['6.3.2.3'], kcFromC1(1.13))
    claims.push({
      ...base, id: `${id}-mb${L / 1000}`, what: `Mb,Rd at ${L / 1000} m, C1 1.13, with f`,
      expected, computed: ltbResistance(chi, r.W, r.fy, 1) / 1e6, unit: 'kNm', ...tolerance(expected, 0.004),
    })
  })
  Nb?.forEach((expected, i) => {
    const L = 3000 * (i + 1)
    claims.push({
      ...base, id: `${id}-nb${L / 1000}`, what: `Nb,z,Rd at ${L / 1000} m`,
      expected, computed: flexuralBuckling(of, 'S355', r.fy, 1, L, 'z').NbRd / 1e3, unit: 'kN', ...tolerance(expected, 0.006),
    })
  })
  return claims.map(judge)
}

function jrc(): PublishedCheck[] {
  const r = resistances('IPE 400', 'S355', 'EN')
  const source = 'Eurocodes – Design of steel buildings with worked examples, Brussels, 16–17 October 2014: IPE 400 S355'
  const claims: Claim[] = [
    { id: 'jrc14-mc', source, standing: 'quoted', what: 'Mc,Rd', expected: 464.0, computed: r.McRd / 1e6, unit: 'kNm', tolerance: 0.1, toleranceReason: 'printed with Wpl,y rounded to 1307 cm³' },
    { id: 'jrc14-vc', source, standing: 'quoted', what: 'Vc,Rd', expected: 875, computed: r.VplRd / 1e3, unit: 'kN', tolerance: 1, toleranceReason: 'printed with Av rounded to 42.69 cm²' },
  ]
  return claims.map(judge)
}

/** Rows of printed resistance tables. */
export function resistanceTables(): PublishedCheck[] {
  return [...ROWS.flatMap(rowChecks), ...jrc()]
}
