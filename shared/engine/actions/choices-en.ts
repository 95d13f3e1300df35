import type { NationalChoice, ValueSource } from './types'

/** Read in the standard's own text or in a text that quotes it. */
export function sourced(source: string): ValueSource {
  return { source, status: 'sourced' }
}

/** Not read in a source: to be confirmed against the national annex, and shown so. */
export function fromMemory(source: string): ValueSource {
  return { source, status: 'from-memory' }
}

const SBE3 = 'Steel Buildings in Europe, Multi-storey, Part 3 Actions'
const SBE4 = 'Steel Buildings in Europe, Multi-storey, Part 4 Detailed design'
const SBE10 = 'Steel Buildings in Europe, Multi-storey, Part 10 Technical software specification'

/** Recommended values of the Eurocodes themselves. */
export const EN: NationalChoice = Object.freeze({
  code: 'EN',
  name: 'Recommended values (EN)',
  gammaM0: 1.0,
  gammaM1: 1.0,
  eta: 1.2,
  yieldRule: 'en-1993',
  gammaG: 1.35,
  gammaQ: 1.5,
  xi: 0.85,
  combinations: ['6.10', '6.10ab'],
  ltb: {
    rolled: { plateau: 0.4, beta: 0.75, curves: [{ upTo: 2, curve: 'b' }, { upTo: null, curve: 'c' }] },
    general: { plateau: 0.2, curves: [{ upTo: 2, curve: 'a' }, { upTo: null, curve: 'b' }] },
    kcRule: 'table-6.6',
  },
  psi: {
    A: { psi0: 0.7, psi1: 0.5, psi2: 0.3 },
    B: { psi0: 0.7, psi1: 0.5, psi2: 0.3 },
    C: { psi0: 0.7, psi1: 0.7, psi2: 0.6 },
    D: { psi0: 0.7, psi1: 0.7, psi2: 0.6 },
    E: { psi0: 1.0, psi1: 0.9, psi2: 0.8 },
    F: { psi0: 0.7, psi1: 0.7, psi2: 0.6 },
    G: { psi0: 0.7, psi1: 0.5, psi2: 0.3 },
    H: { psi0: 0, psi1: 0, psi2: 0 },
  },
  imposed: {
    A: { qk: 2.0, Qk: 2.0 },
    B: { qk: 3.0, Qk: 4.5 },
    C1: { qk: 3.0, Qk: 4.0 },
    C2: { qk: 4.0, Qk: 4.0 },
    C3: { qk: 5.0, Qk: 4.0 },
    C4: { qk: 5.0, Qk: 7.0 },
    C5: { qk: 5.0, Qk: 4.5 },
    D1: { qk: 4.0, Qk: 4.0 },
    D2: { qk: 5.0, Qk: 7.0 },
    E1: { qk: 7.5, Qk: 7.0 },
    F: { qk: 2.5, Qk: 20 },
    G: { qk: 5.0, Qk: 90 },
    H: { qk: 0.4, Qk: 1.0 },
  },
  areaReduction: { kind: 'en', psi0Factor: 5 / 7, referenceArea: 10, leastForCAndD: 0.6, categories: ['A', 'B', 'C', 'D'] },
  storeyReduction: { kind: 'en', categories: ['A', 'B', 'C', 'D'] },
  deflection: [],
  tiePsi: 'psi2',
  sources: {
    gammaM0: sourced('EN 1993-1-1:2005 6.1(1), note 2B'),
    gammaM1: sourced('EN 1993-1-1:2005 6.1(1), note 2B'),
    eta: sourced('EN 1993-1-5:2006 5.1(2), note 2: 1.2 up to S460'),
    yieldRule: sourced('EN 1993-1-1:2005 3.2.1(1), Table 3.1'),
    gammaG: sourced(`EN 1990 Table A1.2(B); ${SBE3}`),
    gammaQ: sourced(`EN 1990 Table A1.2(B); ${SBE3}`),
    xi: sourced(`EN 1990 Table A1.2(B), note 2; ${SBE3}`),
    combinations: sourced('EN 1990 6.4.3.2(3) and Table A1.2(B), note 1'),
    ltbRolled: sourced(`EN 1993-1-1:2005 6.3.2.3(1), Table 6.5; ${SBE10}, 5.2`),
    ltbGeneral: sourced('EN 1993-1-1:2005 6.3.2.2(2), Tables 6.3 and 6.4'),
    kcRule: sourced('EN 1993-1-1:2005 6.3.2.3(2), Table 6.6'),
    psi: sourced('EN 1990 Table A1.1'),
    imposed: sourced('EN 1991-1-1 Tables 6.2, 6.4, 6.8 and 6.10, recommended (underlined) values'),
    areaReduction: sourced(`EN 1991-1-1 (6.1); ${SBE3}, 6.2`),
    storeyReduction: sourced(`EN 1991-1-1 (6.2); ${SBE3}, 6.3`),
    deflection: sourced('EN 1993-1-1:2005 7.2.1(1)B leaves them to the national annex and the client: none recommended'),
    tiePsi: sourced(`EN 1991-1-7 A.5 with EN 1990 6.4.3.3; ${SBE4}, 6.3.3`),
  },
} satisfies NationalChoice)
