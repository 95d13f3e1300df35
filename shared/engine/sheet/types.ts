/**
 * The calculation sheet of one beam, ready to draw and print. All numbers carry the unit they are
 * shown in (kN, kNm, mm, Hz, cm⁴ …) and the digits to show; the sheet is re-calculable from them.
 * Text in `expression`, `substituted` and `symbol` uses a small markup: `M_{b,Rd}` subscript,
 * `L^{2}` superscript, `√(…)`, Greek and `λ̄` as Unicode. Everything else is plain text.
 */
import type { NationalChoice, Override } from '../actions'
import type { LtbMethod } from '../ec3'
import type { Grade } from '../materials'
import type { CheckName } from '../members'
import type { Section } from '../sections'

/** A number as it is to be shown: `value` unrounded, `digits` after the point. */
export interface Quantity { value: number, unit: string, digits: number }

export interface SheetRow {
  /** Clause, "6.3.2.3" or "(6.57)" or "EN 1993-1-5 5.3"; empty where there is none. */
  clause: string
  check: string
  /** In symbols, "M_{c,Rd} = W_{pl,y} f_{y} / γ_{M0}"; empty for rows of words only. */
  expression: string
  /** The same with numbers, in the same order, "2 828.4 × 10^{3} × 345 / 1.0". */
  substituted: string
  /** Left of the limit: the effect (MEd), or a word ("class 1", "> 0.4"), or nothing. */
  effect: Quantity | string | null
  /** The result, resistance or limit. */
  resistance: Quantity | string | null
  utilisation: number | null
  /** The row of the governing check. */
  governs: boolean
}

export interface SheetGroup { title: string, rows: SheetRow[] }

/** Design loads for drawing, of the combination shown. kN/m, kN; x in mm. */
export interface SheetLineLoad { from: number, to: number, value: number, permanent: number, variable: number, height: 'top' | 'shear-centre' }
export interface SheetPointLoad { at: number, value: number, permanent: number, variable: number, height: 'top' | 'shear-centre' }

/** Polylines on one axis. x mm (same array for all; both sides of a jump appear as two equal x). */
export interface SheetDiagrams {
  x: number[]
  /** kN, jumps kept. */
  shear: number[]
  /** kNm, sagging positive. */
  moment: number[]
  /** mm, downward positive, characteristic. */
  deflectionVariable: number[]
  deflectionTotal: number[]
  /** Where to write figures. */
  largest: {
    shear: { x: number, value: number }[]
    moment: { x: number, value: number }
    deflectionVariable: { x: number, value: number }
    deflectionTotal: { x: number, value: number }
  }
}

export interface SheetSegment {
  from: number
  to: number
  held: boolean
  /** null where held or without moment. */
  utilisation: number | null
  governs: boolean
}

/** One row of the section's table: "I_{y}" 66 822 cm⁴. */
export interface SheetProperty { symbol: string, quantity: Quantity }

export interface SheetContext {
  /** "primary beam B / 4–5". */
  title: string
  /** Free facts of the place for the head: scheme, plate, basis version. */
  facts?: string[]
  /** Names of the two ends as on the plan, "4" and "5". */
  ends?: [string, string]
  /** What the loads are, for the loads group: one line per load in the order of the beam's loads (line, then point). */
  loadNames?: { line: string[], point: string[] }
  /** Sections that were offered to this beam, sorted by (mass, h, index): for "why not the next lighter". */
  candidates?: readonly Section[]
  /** Overrides of the national choice in force, printed on the sheet. */
  overrides?: readonly Override[]
  /** ψfi,1 for the critical temperature (EN 1993-1-2 2.4.2); without it the sheet says "not given". */
  psiFire?: number
  /** N; for beams that serve as ties only (EN 1991-1-7 A.5). */
  tieForce?: number
}

export interface CalculationSheet {
  title: string
  section: string
  grade: string
  /** "UB 457×191×67 in S355" typeset designation with ×. */
  designation: string
  facts: string[]
  ends: [string, string]
  span: number
  /** "EN 1993-1-1:2005 + A1:2014, UK choices, 6.10, LTB 6.3.2.3, by segment, f off". */
  method: string
  /** Governing check, its utilisation and a sentence. */
  governing: { check: CheckName, utilisation: number, sentence: string }
  passes: boolean
  /** Name of the shown combination and of all cases verified. */
  combination: string
  selfWeight: Quantity | null
  loads: { line: SheetLineLoad[], point: SheetPointLoad[] }
  reactions: { left: SheetReaction, right: SheetReaction }
  /** Held stretches and restraint points, mm. */
  restraint: { held: { from: number, to: number }[], points: number[] }
  diagrams: SheetDiagrams
  segments: SheetSegment[]
  /** mm limits drawn on the deflection diagram; null = none. */
  deflectionLimits: { variable: number | null, total: number | null }
  groups: SheetGroup[]
  /** Dimensions for the outline, mm. */
  outline: { h: number, b: number, tw: number, tf: number, r: number }
  properties: SheetProperty[]
  /** Why the next lighter section is not enough; null where none is lighter or no candidates were given. */
  whyNotLighter: { section: string, check: CheckName, utilisation: number, sentence: string } | null
  /** National choice, overrides, values from memory. */
  choices: string[]
  notes: string[]
  /** What is not checked here. */
  cautions: string[]
}

/** kN. */
export interface SheetReaction { permanent: number, variable: number, ultimate: number }

/** One part of a force: factors × (towards − away), N. Axial forces have nothing away. */
export interface ColumnSheetTerm { what: string, factors: number[], towards: number, away: number }

/** A moment at one end of a length: Σ terms × lever (mm) × share of the length, Nmm. */
export interface ColumnSheetMoment { terms: ColumnSheetTerm[], lever: number, share: number, value: number }

/** One length of a column between two levels with what its forces are made of. N, mm, Nmm. */
export interface ColumnSheetLength {
  fromLevel: number
  /** Name of the combination that uses the length most. */
  combination: string
  method: 'simple construction' | '6.3.3 Annex B'
  axial: ColumnSheetTerm[]
  NEd: number
  /** At the top and the foot, about y and z. */
  moments: Record<'topY' | 'footY' | 'topZ' | 'footZ', ColumnSheetMoment>
  MyEd: number
  MzEd: number
  LcrY: number
  LcrZ: number
  /** Length of lateral-torsional buckling. */
  ltbLength: number
  /** Factors of Table B.3; used by 6.3.3 only. */
  Cmy: number
  Cmz: number
  CmLT: number
  utilisation: number
}

export interface ColumnSheetLift { fromLevel: number, toLevel: number, section: Section, utilisation: number, lengths: ColumnSheetLength[] }

/** A sized column as its sheet needs it: lifts from the base upwards. N, mm. */
export interface ColumnSheetInput {
  grade: Grade
  choice: NationalChoice
  ltbMethod: LtbMethod
  /** "6.10" or "6.10a and 6.10b". */
  combinations: string
  storeyHeight: number
  utilisationLimit: number
  lifts: ColumnSheetLift[]
  /** kg */
  mass: number
  base: { permanent: number, variable: number, ultimate: number }
}

export interface ColumnSheetLiftShown {
  /** "Levels 0 to 2". */
  levels: string
  section: string
  designation: string
  utilisation: number
  outline: CalculationSheet['outline']
  properties: SheetProperty[]
  /** The length that is used most in full, the others in a row each. */
  groups: SheetGroup[]
}

/** The calculation sheet of one column: the groups and rows of `CalculationSheet`, lift by lift. */
export interface ColumnSheet {
  title: string
  grade: string
  facts: string[]
  method: string
  /** Highest utilisation of all lifts, where, and the parts of its expression. */
  governing: { lift: number, fromLevel: number, utilisation: number, sentence: string }
  passes: boolean
  /** mm */
  height: number
  /** kg */
  mass: number
  /** kN at the base, own weight included. */
  base: SheetReaction
  lifts: ColumnSheetLiftShown[]
  choices: string[]
  cautions: string[]
}
