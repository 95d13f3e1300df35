import { criticalMoment, criticalMomentUniform, ltbReduction, ltbSlenderness } from '../ec3'
import { judge, share } from './check'
import type { Claim } from './check'
import { endMomentsC1, pointLoadsMcr, resistances, section, uniformLoadMcr } from './common'
import type { PublishedCheck } from './types'

const SN003 = 'NCCI SN003, elastic critical moment for lateral torsional buckling, k = kw = 1'
const BASIS = 'Engineering basis, section 6: eigenvalue computed independently of this engine'

/** C2 from the eigenvalue with the load at zg: Mcr = C1 Nz {√[… + (C2 zg)²] − C2 zg} solved for C2. */
function secondFactor(Mcr: number, Mcr0: number, C1: number, L: number, Iz: number, zg: number): number {
  const Nz = Math.PI ** 2 * 210_000 * Iz / (L * L)
  const r = Mcr / (C1 * Nz)
  const s = Mcr0 / Nz
  return (s * s - r * r) / (2 * r * zg)
}

function sn003(): PublishedCheck[] {
  const ipe = section('IPE 330')
  const long = 40_000
  const psis: readonly (readonly [number, number])[] = [
    [1, 1.00], [0.75, 1.14], [0.5, 1.31], [0.25, 1.52], [0, 1.77], [-0.25, 2.05], [-0.5, 2.33], [-0.75, 2.57],
  ]
  const uniform = criticalMomentUniform(ipe, long)
  const claims: Claim[] = psis.map(([psi, expected]) => ({
    id: `sn003-psi-${psi}`, source: SN003, standing: 'quoted', what: `C1 of end moments, ψ = ${psi.toFixed(2)} (IPE 330, 40 m)`,
    expected, computed: endMomentsC1(ipe, long, psi), unit: '',
    ...share(expected, 0.012, 'long-beam values of three figures; shorter beams lie up to 8 % higher'),
  }))
  claims.push(
    { id: 'sn003-udl', source: SN003, standing: 'quoted', what: 'C1 of a uniform load', expected: 1.127, computed: uniformLoadMcr(ipe, long, 0) / uniform, unit: '', ...share(1.127, 0.005, 'published approximation; the eigenvalue lies 0.3–0.4 % above') },
    { id: 'sn003-point', source: SN003, standing: 'quoted', what: 'C1 of a central load', expected: 1.348, computed: pointLoadsMcr(ipe, long, 1, 0) / uniform, unit: '', ...share(1.348, 0.012, 'published approximation; the eigenvalue gives 1.353–1.364') },
  )
  return claims.map(judge)
}

/** The ranges of the engineering basis over the torsion parameter: short and long, slender and stocky. */
function ranges(): PublishedCheck[] {
  const bodies = [
    { name: 'IPE 330, 6 m', of: section('IPE 330'), L: 6000 },
    { name: 'UB 610x229x101, 9 m', of: section('UB 610x229x101'), L: 9000 },
    { name: 'HEB 300, 9 m', of: section('HEB 300'), L: 9000 },
  ]
  const C1: readonly (readonly [n: number, low: number, high: number])[] = [
    [0, 1.130, 1.132], [1, 1.353, 1.364], [2, 1.091, 1.095], [3, 1.183, 1.186], [4, 1.116, 1.120], [5, 1.152, 1.156],
  ]
  const C2: readonly (readonly [n: number, low: number, high: number])[] = [
    [0, 0.455, 0.458], [1, 0.553, 0.580], [2, 0.492, 0.500], [3, 0.476, 0.481], [4, 0.468, 0.473], [5, 0.464, 0.468],
  ]
  const claims: Claim[] = []
  for (const { name, of, L } of bodies) {
    const uniform = criticalMomentUniform(of, L)
    const solve = (n: number, zg: number) => n === 0 ? uniformLoadMcr(of, L, zg) : pointLoadsMcr(of, L, n, zg)
    const load = (n: number) => n === 0 ? 'a uniform load' : `${n} equal load${n > 1 ? 's' : ''}`
    C1.forEach(([n, low, high], i) => {
      const first = solve(n, 0) / uniform
      const zg = of.h / 2
      const second = secondFactor(solve(n, zg), uniform, first, L, of.Iz, zg)
      const [, low2, high2] = C2[i]!
      const within = (a: number, b: number, digit: number) => ({ tolerance: (b - a) / 2 + digit / 2, toleranceReason: 'the printed range over the torsion parameter, and half of its last figure' })
      claims.push(
        { id: `basis-c1-${n}-${name}`, source: BASIS, standing: 'computed independently', what: `C1 of ${load(n)} (${name})`, expected: (low + high) / 2, computed: first, unit: '', ...within(low, high, 0.001) },
        { id: `basis-c2-${n}-${name}`, source: BASIS, standing: 'computed independently', what: `C2 of ${load(n)} (${name})`, expected: (low2 + high2) / 2, computed: second, unit: '', ...within(low2, high2, 0.001) },
      )
    })
  }
  return claims.map(judge)
}

function practicePage(): PublishedCheck[] {
  const ub = section('UB 533x210x92')
  const { W, fy, curves } = resistances('UB 533x210x92', 'S355', 'UK')
  const source = 'Practice page, worked check (b): UB 533x210x92 S355, curve c, no f'
  const Mb = (Mcr: number) => ltbReduction(ltbSlenderness(W, fy, Mcr), curves['6.3.2.3']) * W * fy / 1e6
  const printed: readonly (readonly [string, (L: number) => number, readonly [number, number, number], number])[] = [
    ['uniform moment', L => criticalMomentUniform(ub, L), [672, 378, 240], 325],
    ['uniform load, shear centre', L => uniformLoadMcr(ub, L, 0), [694, 409, 264], 367],
    ['uniform load, top flange', L => uniformLoadMcr(ub, L, ub.h / 2), [609, 320, 208], 266],
  ]
  return printed.flatMap(([what, Mcr, values, at75]) => {
    const claims: Claim[] = values.map((expected, i) => ({
      id: `practice-b-${what}-${3 * (i + 1)}`, source, standing: 'computed independently', what: `Mb,Rd, ${what}, ${3 * (i + 1)} m`,
      expected, computed: Mb(Mcr(3000 * (i + 1))), unit: 'kNm',
      ...share(expected, 0.005, 'its C1 and C2 are the rounded 1.127 and 0.454: 0.5 %'),
    }))
    claims.push({
      id: `practice-b-${what}-mcr`, source, standing: 'computed independently', what: `Mcr, ${what}, 7.5 m`,
      expected: at75, computed: Mcr(7500) / 1e6, unit: 'kNm', ...share(at75, 0.006, 'its C1 and C2 are the rounded 1.127 and 0.454: 0.6 %'),
    })
    return claims.map(judge)
  })
}

/** Uniform moment against the closed solution, which is exact. */
function uniformMoment(): PublishedCheck[] {
  return ([['IPE 330', 3000], ['IPE 330', 12_000], ['UB 457x191x67', 6000], ['HEM 300', 9000], ['UB 203x102x23', 2000]] as const).map(([designation, L]) => {
    const of = section(designation)
    const exact = criticalMomentUniform(of, L)
    const computed = criticalMoment({ pieces: [{ length: L, M: 1e6, V: 0, q: 0 }], section: of, zg: 0 }).Mcr
    return judge({
      id: `closed-${designation}-${L}`, source: 'Closed solution of the Vlasov beam under uniform moment', standing: 'computed independently',
      what: `Mcr of ${designation}, ${L / 1000} m`, expected: exact / 1e6, computed: computed / 1e6, unit: 'kNm',
      ...share(exact / 1e6, 1e-4, 'the mesh must give the closed solution to 1e-4'),
    })
  })
}

/** Elastic critical moments against published factors and independent solutions. */
export function criticalMoments(): PublishedCheck[] {
  return [...sn003(), ...ranges(), ...practicePage(), ...uniformMoment()]
}
