import { EN, fromMemory, sourced } from './choices-en'
import type { ChoiceValueName, NationalChoice, ValueSource } from './types'

const SBE4 = 'Steel Buildings in Europe, Multi-storey, Part 4 Detailed design, Table 4.2'

/** Every value of that annex from memory, but those named. */
function sources(annex: string, known: Partial<Record<ChoiceValueName, ValueSource>> = {}): Record<ChoiceValueName, ValueSource> {
  const names = Object.keys(EN.sources) as ChoiceValueName[]
  const all = Object.fromEntries(names.map(name => [name, fromMemory(`${annex}: not read, confirm before use`)]))
  return { ...all, ...known } as Record<ChoiceValueName, ValueSource>
}

/** Ireland. */
export const IE: NationalChoice = Object.freeze({
  ...EN,
  code: 'IE',
  name: 'Ireland',
  eta: 1.0,
  yieldRule: 'product-standard',
  psi: { ...EN.psi, H: { psi0: 0.6, psi1: 0, psi2: 0 } },
  ltb: { ...EN.ltb, rolled: EN.ltb.rolled },
  deflection: [
    { what: 'beams carrying brittle finishes', load: 'variable', ratio: 360 },
    { what: 'other beams', load: 'variable', ratio: 200 },
  ],
  sources: sources('Irish national annexes to I.S. EN 1990, 1991-1-1, 1993-1-1'),
} satisfies NationalChoice)

/** Germany. γM1 1.1; αA and αn of the German annex. */
export const DE: NationalChoice = Object.freeze({
  ...EN,
  code: 'DE',
  name: 'Germany',
  gammaM1: 1.1,
  combinations: ['6.10'],
  areaReduction: {
    kind: 'hyperbola',
    referenceArea: 10,
    bases: [{ categories: ['A', 'B'], base: 0.5 }, { categories: ['C', 'D'], base: 0.7 }],
  },
  storeyReduction: { kind: 'hyperbola', base: 0.7, numerator: 0.6, categories: ['A', 'B', 'C', 'D'] },
  sources: sources('German national annexes to DIN EN 1990, 1991-1-1, 1993-1-1, 1993-1-5'),
} satisfies NationalChoice)

/** France. Its annex gives λ̄LT,0 and α by h/b in a form of its own: recommended values stand here. */
export const FR: NationalChoice = Object.freeze({
  ...EN,
  code: 'FR',
  name: 'France',
  combinations: ['6.10'],
  deflection: [
    { what: 'floors in general', load: 'total', ratio: 200 },
    { what: 'floors in general', load: 'variable', ratio: 300 },
    { what: 'floors with brittle finishes', load: 'total', ratio: 250 },
    { what: 'floors with brittle finishes', load: 'variable', ratio: 350 },
  ],
  sources: sources('French national annexes to NF EN 1990, 1991-1-1, 1993-1-1', {
    ltbRolled: fromMemory('French national annex to NF EN 1993-1-1: it has expressions of its own for rolled sections; the recommended values stand here, confirm before use'),
    deflection: sourced(SBE4),
  }),
} satisfies NationalChoice)

/** Netherlands. 6.10a/6.10b with γG 1.35 and 1.2 (ξ 0.89), consequence class 2; ψ0 lower than recommended. */
export const NL: NationalChoice = Object.freeze({
  ...EN,
  code: 'NL',
  name: 'Netherlands',
  xi: 0.89,
  combinations: ['6.10ab'],
  psi: {
    ...EN.psi,
    A: { psi0: 0.4, psi1: 0.5, psi2: 0.3 },
    B: { psi0: 0.5, psi1: 0.5, psi2: 0.3 },
    C: { psi0: 0.6, psi1: 0.7, psi2: 0.6 },
    D: { psi0: 0.6, psi1: 0.7, psi2: 0.6 },
  },
  sources: sources('Dutch national annexes to NEN-EN 1990, 1991-1-1, 1993-1-1'),
} satisfies NationalChoice)

/** Sweden. 6.10a/6.10b with ξ 0.89, safety class 3. */
export const SE: NationalChoice = Object.freeze({
  ...EN,
  code: 'SE',
  name: 'Sweden',
  xi: 0.89,
  combinations: ['6.10ab'],
  sources: sources('Swedish national rules for the application of the European design standards'),
} satisfies NationalChoice)
