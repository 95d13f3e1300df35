import { areaReduction, combinationFactors, nationalChoice, psi, storeyReduction } from '../actions'
import { criticalTemperature, flexuralReduction, ltbReduction } from '../ec3'
import { effectsOf, fundamentalFrequency, largestMoment, largestSag, largestShear, stationsOf } from '../statics'
import { halfDigit, judge } from './check'
import type { Claim } from './check'
import { resistances } from './common'
import type { PublishedCheck } from './types'

function combination(): PublishedCheck[] {
  const choice = nationalChoice('UK')
  const source = 'Worked UK example of a column over 8 storeys with a roof: G 5553.6, Q 2279.5 (roof 42.0) kN'
  const [G, Q, roof] = [5553.6, 2279.5, 42.0]
  const alpha = storeyReduction(choice, 'B', 8)
  const psi0 = psi(choice, 'H').psi0
  const floors = alpha * (Q - roof)
  const [first] = combinationFactors(choice, '6.10')
  const [a, b] = combinationFactors(choice, '6.10ab')
  const tolerance = { tolerance: 0.2, toleranceReason: 'the print rounds its intermediate sums' }
  const base = { source, standing: 'quoted' as const, unit: 'kN', ...tolerance }
  const claims: Claim[] = [
    { ...base, id: 'comb-610', what: '6.10, αn on the floors, ψ0 on the roof', expected: 9555.3, computed: first!.permanent * G + first!.variable * (floors + psi0 * roof) },
    { ...base, id: 'comb-610a', what: '6.10a, αn on the roof too', expected: 8933.4, computed: a!.permanent * G + a!.accompanying * psi(choice, 'B').psi0 * alpha * Q },
    { ...base, id: 'comb-610a-floors', what: '6.10a, αn on the floors only', expected: 8951.1, computed: a!.permanent * G + a!.accompanying * psi(choice, 'B').psi0 * (floors + roof) },
    { ...base, id: 'comb-610b', what: '6.10b, ξ·1.35 not rounded', expected: 8992.9, computed: b!.permanent * G + b!.variable * (floors + psi0 * roof) },
    { ...base, id: 'comb-610b-rounded', what: '6.10b, with ξ·1.35 rounded to 1.25 as printed', expected: 9000.0, computed: Math.round(100 * b!.permanent) / 100 * G + b!.variable * (floors + psi0 * roof) },
  ]
  return claims.map(judge)
}

function reductions(): PublishedCheck[] {
  const EN = nationalChoice('EN')
  const UK = nationalChoice('UK')
  const en = { source: 'EN 1991-1-1 (6.1), (6.2); Steel Buildings in Europe, Part 3', standing: 'computed independently' as const, unit: '' }
  const uk = { source: 'UK National Annex to EN 1991-1-1, αn (quoted by a worked example)', standing: 'read' as const, unit: '' }
  const memory = { source: 'UK National Annex to EN 1991-1-1, αA', standing: 'from memory' as const, unit: '' }
  const claims: Claim[] = [
    { ...en, id: 'alpha-a-en', what: 'αA, category B, 40 m²', expected: 0.75, computed: areaReduction(EN, 'B', 40), ...halfDigit(2) },
    { ...en, id: 'alpha-n-en', what: 'αn, category B, 4 storeys', expected: 0.85, computed: storeyReduction(EN, 'B', 4), ...halfDigit(2) },
    { ...memory, id: 'alpha-a-uk', what: 'αA, 100 m²', expected: 0.9, computed: areaReduction(UK, 'B', 100), ...halfDigit(2) },
    { ...memory, id: 'alpha-a-uk-least', what: 'αA, 400 m²', expected: 0.75, computed: areaReduction(UK, 'B', 400), ...halfDigit(2) },
    ...([[1, 1.0], [3, 0.8], [5, 0.6], [6, 0.6], [10, 0.6], [11, 0.5]] as const).map(([n, expected]) => (
      { ...uk, id: `alpha-n-uk-${n}`, what: `αn, ${n} storey${n > 1 ? 's' : ''}`, expected, computed: storeyReduction(UK, 'B', n), ...halfDigit(2) })),
  ]
  return claims.map(judge)
}

function frequency(): PublishedCheck[] {
  const g = 9810
  const L = 6000
  const x = stationsOf(L, [L / 2])
  const uniform = largestSag(x, effectsOf(x, [{ from: 0, to: L, q: 1 }], [])).value
  const exact = { source: 'Exact constants of f √δ of a simply supported beam', standing: 'computed independently' as const, unit: '' }
  const claims: Claim[] = [
    { ...exact, id: 'freq-udl', what: 'uniform load: (π/2) √(g · δ E I/(w L⁴))', expected: 17.75, computed: Math.PI / 2 * Math.sqrt(g * uniform / L ** 4), ...halfDigit(2) },
    { id: 'freq-bute', source: 'Solution manual, Budapest University of Technology, 10.11', standing: 'read', what: 'f of δ 1.056 + 0.0492 mm', expected: 17.12, computed: fundamentalFrequency(1.056 + 0.0492), unit: 'Hz', ...halfDigit(2) },
  ]
  return claims.map(judge)
}

function spotValues(): PublishedCheck[] {
  const curveC = resistances('UB 457x191x67', 'S355', 'UK').curves['6.3.2.3']
  const spot = { source: 'Spot values from the formulae of 6.3.1 and 6.3.2.3', standing: 'computed independently' as const, unit: '', ...halfDigit(4) }
  const fire = { source: 'EN 1993-1-2 (4.22), spot values of the practice page', standing: 'computed independently' as const, unit: '°C', ...halfDigit(0) }
  const claims: Claim[] = [
    { ...spot, id: 'chi-b', what: 'χ, curve b, λ̄ 0.5', expected: 0.8842, computed: flexuralReduction(0.5, 'b') },
    { ...spot, id: 'chi-lt-c', what: 'χLT, curve c, β 0.75, λ̄LT,0 0.4, λ̄LT 1.0', expected: 0.6391, computed: ltbReduction(1, curveC) },
    ...([[0.7, 526], [0.6, 554], [0.5, 585]] as const).map(([mu, expected]) => (
      { ...fire, id: `fire-${mu}`, what: `θcr, μ0 ${mu}`, expected, computed: criticalTemperature(mu)! })),
  ]
  return claims.map(judge)
}

function handCheck(): PublishedCheck[] {
  const source = 'Practice page, worked check (a): secondary beam 7.5 m at 3.0 m, G 3.6, Q 3.8 kN/m², own weight excluded'
  const L = 7500
  const x = stationsOf(L, [])
  const design = effectsOf(x, [{ from: 0, to: L, q: 3 * (1.35 * 3.6 + 1.5 * 3.8) }], [])
  const least = (q: number, ratio: number) => largestSag(x, effectsOf(x, [{ from: 0, to: L, q }], [])).value / (210_000 * L / ratio) / 1e4
  const base = { source, standing: 'computed independently' as const }
  const claims: Claim[] = [
    { ...base, id: 'practice-a-m', what: 'MEd', expected: 222.8, computed: largestMoment(x, design).value / 1e6, unit: 'kNm', ...halfDigit(1) },
    { ...base, id: 'practice-a-v', what: 'VEd', expected: 118.8, computed: largestShear(x, design).value / 1e3, unit: 'kN', ...halfDigit(1) },
    { ...base, id: 'practice-a-i1', what: 'least Iy for span/360 under variable load', expected: 10_735, computed: least(3 * 3.8, 360), unit: 'cm⁴', tolerance: 1, toleranceReason: 'the print cuts the last figure' },
    { ...base, id: 'practice-a-i2', what: 'least Iy for span/200 in total', expected: 11_614, computed: least(3 * 7.4, 200), unit: 'cm⁴', tolerance: 1, toleranceReason: 'the print cuts the last figure' },
  ]
  return claims.map(judge)
}

/** Actions, statics, serviceability and spot values of reduction factors. */
export function actionsAndService(): PublishedCheck[] {
  return [...combination(), ...reductions(), ...frequency(), ...spotValues(), ...handCheck()]
}
