import { nationalChoice } from '../actions'
import {
  classInBending, criticalMomentClosed, epsilon, flangeOutstand, flexuralBuckling, ltbPhi, ltbReduction, ltbSlenderness,
  c1c2TwoLoads, criticalMoment, criticalMomentUniform, tieForce, webStraightDepth,
} from '../ec3'
import { verifyBeam } from '../members'
import type { Beam } from '../members'
import { halfDigit, judge, share } from './check'
import type { Claim } from './check'
import { resistances, section, uniformLoadMcr } from './common'
import type { PublishedCheck } from './types'

const PART_4 = 'Steel Buildings in Europe, Multi-storey, Part 4 Detailed design (2010)'
const PART_8 = 'Steel Buildings in Europe, Multi-storey, Part 8 (2010)'
const PART_10 = 'Steel Buildings in Europe, Multi-storey, Part 10 Technical software specification (2010)'

/** Properties as example A.1 prints them: Iz mm⁴, It mm⁴, Iw mm⁶; G 80 770 N/mm². */
const PRINTED = { Iz: 788.1e4, It: 28.15e4, Iw: 199_100e6 }
const PRINTED_G = 80_770

function exampleBeam(): Beam {
  return {
    span: 5700,
    selfWeight: false,
    service: {
      name: 'in service',
      line: [{ from: 0, to: 5700, permanent: 9.56, variable: 6.25, accompanying: 4.375, height: 'top' }],
      point: [],
      restraint: { held: [], points: [] },
    },
    construction: [],
  }
}

function exampleA1(): PublishedCheck[] {
  const choice = nationalChoice('EN')
  const ipe = section('IPE 330')
  const { curves, W, fy } = resistances('IPE 330', 'S235', 'EN')
  const verified = verifyBeam(exampleBeam(), ipe, 'S235', {
    choice, combination: '6.10', criticalMoment: 'by-segment', ltbMethod: '6.3.2.3', useF: false,
    limits: { variable: null, total: null, frequency: null, variableShare: 0 }, utilisationLimit: 1,
  })
  const view = verified.cases[0]!
  const curve = curves['6.3.2.3']
  const closed = criticalMomentClosed(PRINTED, 5700, 1.127, 0.454, 165, PRINTED_G)
  const lambda = ltbSlenderness(W, fy, closed)
  const claim = (id: string, what: string, expected: number, computed: number, unit: string, tolerance: ReturnType<typeof halfDigit>): Claim => ({
    id: `sbe-a1-${id}`, source: `${PART_4}, example A.1, IPE 330 S235, 5.70 m`, standing: 'read', what, expected, computed, unit, ...tolerance,
  })
  return [
    claim('c-tf', 'flange slenderness c/tf', 5.07, flangeOutstand(ipe) / ipe.tf, '', halfDigit(2)),
    claim('c-tw', 'web slenderness c/tw', 36.1, webStraightDepth(ipe) / ipe.tw, '', halfDigit(1)),
    claim('class', 'class in bending', 1, classInBending(ipe, 235), '', halfDigit(0)),
    claim('med', 'MEd', 90.48, view.MEd / 1e6, 'kNm', { tolerance: 0.02, toleranceReason: 'the print goes on with its rounded load of 22.28 kN/m' }),
    claim('ved', 'VEd', 63.50, view.VEd / 1e3, 'kN', halfDigit(2)),
    claim('mcr-closed', 'Mcr, closed form with the printed properties', 113.9, closed / 1e6, 'kNm', halfDigit(1)),
    claim('mcr', 'Mcr, eigenvalue with properties from the dimensions, load on the top flange', 113.9, view.Mcr! / 1e6, 'kNm',
      share(113.9, 0.015, 'properties computed from the dimensions and G 81 000: 1.5 %')),
    claim('lambda', 'λ̄LT', 1.288, lambda, '', halfDigit(3)),
    claim('phi', 'ΦLT, curve c', 1.340, ltbPhi(lambda, curve), '', halfDigit(3)),
    claim('chi', 'χLT', 0.480, ltbReduction(lambda, curve), '', halfDigit(3)),
    claim('chi-full', 'χLT by the eigenvalue', 0.480, view.chiLT, '', share(0.480, 0.015, 'follows Mcr, 1.5 %')),
  ].map(judge)
}

function classification(): PublishedCheck[] {
  const ipe = section('IPE 500')
  const source = `${PART_8}, classification, IPE 500 S355`
  const eps = epsilon(355)
  const rounded = { tolerance: 0.3, toleranceReason: 'printed with ε rounded to 0.81' }
  const claims: Claim[] = [
    { id: 'sbe-8-web', source, standing: 'read', what: 'web slenderness c/tw', expected: 41.8, computed: webStraightDepth(ipe) / ipe.tw, unit: '', ...halfDigit(1) },
    { id: 'sbe-8-web-limit', source, standing: 'read', what: 'limit 72ε', expected: 58.3, computed: 72 * eps, unit: '', ...rounded },
    { id: 'sbe-8-flange', source, standing: 'read', what: 'flange slenderness c/tf', expected: 4.6, computed: flangeOutstand(ipe) / ipe.tf, unit: '', ...halfDigit(1) },
    { id: 'sbe-8-flange-limit', source, standing: 'read', what: 'limit 9ε', expected: 7.3, computed: 9 * eps, unit: '', ...halfDigit(1) },
    { id: 'sbe-8-class', source, standing: 'read', what: 'class in bending', expected: 1, computed: classInBending(ipe, 355), unit: '', ...halfDigit(0) },
  ]
  return claims.map(judge)
}

function columnA5(): PublishedCheck[] {
  const he = section('HEB 300')
  const y = flexuralBuckling(he, 'S235', 235, 1, 8000, 'y')
  const z = flexuralBuckling(he, 'S235', 235, 1, 5600, 'z')
  const source = `${PART_4}, example A.5, HE 300 B S235`
  const printedI = { tolerance: 8, toleranceReason: 'printed with Iy rounded to 25 170 cm⁴: 0.1 %' }
  const claims: Claim[] = [
    { id: 'sbe-a5-ncry', source, standing: 'read', what: 'Ncr,y, 8.0 m', expected: 8151.2, computed: y.Ncr / 1e3, unit: 'kN', ...printedI },
    { id: 'sbe-a5-ncrz', source, standing: 'read', what: 'Ncr,z, 5.6 m', expected: 5657.4, computed: z.Ncr / 1e3, unit: 'kN', tolerance: 6, toleranceReason: 'printed with Iz rounded to 8563 cm⁴: 0.1 %' },
    { id: 'sbe-a5-ly', source, standing: 'read', what: 'λ̄y', expected: 0.655, computed: y.lambda, unit: '', tolerance: 0.001, toleranceReason: 'printed with the rounded area 149.1 cm²' },
    { id: 'sbe-a5-lz', source, standing: 'read', what: 'λ̄z', expected: 0.787, computed: z.lambda, unit: '', tolerance: 0.001, toleranceReason: 'printed with the rounded area 149.1 cm²' },
    { id: 'sbe-a5-chiy', source, standing: 'read', what: 'χy, curve b', expected: 0.808, computed: y.chi, unit: '', ...halfDigit(3) },
  ]
  return claims.map(judge)
}

function twoLoads(): PublishedCheck[] {
  const ipe = section('IPE 330')
  const L = 12_000
  return [0.2, 0.25, 1 / 3, 0.4].map((alpha) => {
    const a = alpha * L
    const pieces = [
      { length: a, M: 0, V: 1, q: 0 }, { length: L - 2 * a, M: a, V: 0, q: 0 }, { length: a, M: a, V: -1, q: 0 },
    ]
    const exact = criticalMoment({ pieces, section: ipe, zg: 0 }).Mcr / criticalMomentUniform(ipe, L)
    return judge({
      id: `sbe-10-two-loads-${alpha.toFixed(2)}`,
      source: `${PART_10}, Table 5.1`,
      standing: 'read',
      what: `C1 of two equal loads at ${alpha.toFixed(2)} L: the eigenvalue beside 1 + 2.92 α³`,
      expected: c1c2TwoLoads(alpha).C1,
      computed: exact,
      unit: '',
      tolerance: 0,
      toleranceReason: 'a shown deviation of a published approximation, not an equality',
      shown: true,
    })
  })
}

function ties(): PublishedCheck[] {
  const source = `EN 1991-1-7 A.5 as in ${PART_4}, 6.3.3, with the figures of the practice page`
  const claims: Claim[] = [
    { id: 'tie-secondary', source, standing: 'computed independently', what: 'internal tie, 3.6 + 0.5 × 3.8 kN/m², s 3.0, L 7.5 m', expected: 99, computed: tieForce('internal', 0.0036, 0.0038, 0.5, 3000, 7500) / 1e3, unit: 'kN', ...halfDigit(1) },
    { id: 'tie-primary', source, standing: 'computed independently', what: 'internal tie, s 7.5, L 9.0 m', expected: 297, computed: tieForce('internal', 0.0036, 0.0038, 0.5, 7500, 9000) / 1e3, unit: 'kN', ...halfDigit(1) },
    { id: 'tie-least', source, standing: 'read', what: 'least tie force', expected: 75, computed: tieForce('perimeter', 0.0036, 0.0038, 0.5, 1500, 3000) / 1e3, unit: 'kN', ...halfDigit(1) },
  ]
  return claims.map(judge)
}

/** Top-flange uniform load, for the eye: the closed three-factor form against the eigenvalue. */
function loadHeight(): PublishedCheck[] {
  const ub = section('UB 610x229x101')
  return [judge({
    id: 'top-load-610',
    source: 'Practice page, worked check: UB 610x229x101 S355, 9 m, uniform load on the top flange',
    standing: 'computed independently',
    what: 'Mb,Rd, curve c, no f',
    expected: 248,
    computed: (() => {
      const { W, fy, curves } = resistances('UB 610x229x101', 'S355', 'UK')
      return ltbReduction(ltbSlenderness(W, fy, uniformLoadMcr(ub, 9000, ub.h / 2)), curves['6.3.2.3']) * W * fy / 1e6
    })(),
    unit: 'kNm',
    ...share(248, 0.005, 'its C1 and C2 are the rounded 1.127 and 0.454: 0.5 %'),
  })]
}

/** Checks printed in the documents of *Steel Buildings in Europe* and on its rules. */
export function steelBuildingsInEurope(): PublishedCheck[] {
  return [...exampleA1(), ...classification(), ...columnA5(), ...twoLoads(), ...ties(), ...loadHeight()]
}
