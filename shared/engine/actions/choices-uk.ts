import { EN, fromMemory, sourced } from './choices-en'
import type { NationalChoice } from './types'

const NA_1990 = 'NA to BS EN 1990:2002'
const NA_1991 = 'NA to BS EN 1991-1-1:2002'
const NA_1993 = 'NA to BS EN 1993-1-1:2005'
const TABLES = 'British section resistance tables to Eurocode 3 with the UK National Annex (2019)'

/** United Kingdom. */
export const UK: NationalChoice = Object.freeze({
  code: 'UK',
  name: 'United Kingdom',
  gammaM0: 1.0,
  gammaM1: 1.0,
  eta: 1.0,
  yieldRule: 'product-standard',
  gammaG: 1.35,
  gammaQ: 1.5,
  xi: 0.925,
  combinations: ['6.10', '6.10ab'],
  ltb: {
    rolled: {
      plateau: 0.4,
      beta: 0.75,
      curves: [{ upTo: 2, curve: 'b' }, { upTo: 3.1, curve: 'c' }, { upTo: null, curve: 'd' }],
    },
    general: EN.ltb.general,
    kcRule: '1/sqrt(C1)',
  },
  psi: { ...EN.psi, H: { psi0: 0.7, psi1: 0, psi2: 0 } },
  imposed: {
    A: { qk: 1.5, Qk: 2.0 },
    B: { qk: 2.5, Qk: 2.7 },
    C1: { qk: 2.0, Qk: 3.0 },
    C2: { qk: 4.0, Qk: 3.6 },
    C3: { qk: 3.0, Qk: 4.5 },
    C4: { qk: 5.0, Qk: 7.0 },
    C5: { qk: 5.0, Qk: 3.6 },
    D1: { qk: 4.0, Qk: 3.6 },
    D2: { qk: 4.0, Qk: 3.6 },
    E1: { qk: 7.5, Qk: 4.5 },
    F: { qk: 2.5, Qk: 10 },
    G: { qk: 5.0, Qk: null },
    H: { qk: 0.6, Qk: 0.9 },
  },
  areaReduction: { kind: 'linear', perArea: 1000, least: 0.75, categories: ['A', 'B', 'C', 'D'] },
  storeyReduction: { kind: 'steps', categories: ['A', 'B', 'C', 'D'] },
  deflection: [
    { what: 'beams carrying brittle finishes', load: 'variable', ratio: 360 },
    { what: 'other beams', load: 'variable', ratio: 200 },
  ],
  tiePsi: 'psi1',
  sources: {
    gammaM0: sourced(`${NA_1993}, NA.2.15, as applied in the ${TABLES}`),
    gammaM1: sourced(`${NA_1993}, NA.2.15, as applied in the ${TABLES}`),
    eta: sourced('NA to BS EN 1993-1-5:2006, NA.2.4 (1.0 for all steels), as a public copy quotes it'),
    yieldRule: sourced(`${NA_1993}, NA.2.4: nominal values of the product standard, as applied in the ${TABLES}`),
    gammaG: sourced(`${NA_1990}, Table NA.A1.2(B), quoted by a worked example (column, 10 storeys)`),
    gammaQ: sourced(`${NA_1990}, Table NA.A1.2(B), quoted by a worked example (column, 10 storeys)`),
    xi: sourced(`${NA_1990}, Table NA.A1.2(B), quoted by a worked example (column, 10 storeys)`),
    combinations: sourced(`${NA_1990}, Table NA.A1.2(B)`),
    ltbRolled: fromMemory(`${NA_1993}, NA.2.17 (λ̄LT,0, β and curve c confirmed by the ${TABLES}; curve d above h/b 3.1 not)`),
    ltbGeneral: fromMemory(`${NA_1993}, NA.2.16`),
    kcRule: sourced(`${NA_1993}, NA.2.18, as applied in the ${TABLES}`),
    psi: fromMemory(`${NA_1990}, Table NA.A1.1 (ψ0 0.7 of floors and roofs quoted by a worked example)`),
    imposed: fromMemory(`${NA_1991}, Tables NA.3, NA.5, NA.6 and NA.7`),
    areaReduction: sourced(`${NA_1991}, NA.2.5, 6.3.1.2(10), quoted by a public summary`),
    storeyReduction: sourced(`${NA_1991}, NA.2.6, 6.3.1.2(11), quoted by a worked example (column, 10 storeys)`),
    deflection: fromMemory(`${NA_1993}, NA.2.23, advisory`),
    tiePsi: fromMemory('common UK practice with EN 1991-1-7 A.5'),
  },
} satisfies NationalChoice)
