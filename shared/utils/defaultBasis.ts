import type { Basis } from '#shared/schemas/basis'

/**
 * What a project starts from until its basis of design is saved. The national choice is only a
 * starting value: the page asks for it before the first save, since nobody should design to a national
 * annex that they did not choose. Deflection limits are those of common British practice
 * (span/360 under the variable load, span/200 in total).
 */
export const DEFAULT_BASIS: Basis = {
  nationalChoice: 'UK',
  overrides: {},
  combination: '6.10',
  criticalMoment: 'by-segment',
  ltbMethod: '6.3.2.3',
  useF: false,
  constructionStage: true,
  secondary: { grade: 'S355', families: ['UB'] },
  primary: { grade: 'S355', families: ['UB'] },
  column: { grade: 'S355', families: ['UC'] },
  limits: { variable: 360, total: 200, frequency: null, variableShare: 0.1, floorFrequency: null },
  buildability: { secondaryNotDeeper: false, minFlangeWidth: null, maxPiece: null },
  connectionAllowance: 0,
  bracingAllowance: 0,
  utilisationLimit: 1,
  reductions: { area: false, storeys: false },
  liftStoreys: 2,
  minSecondarySpacing: null,
  trimDistance: 600,
}
