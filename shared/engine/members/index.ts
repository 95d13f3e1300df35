export { verifyBeam } from './verify'
export { lightestSections, sectionVerdicts } from './lightest'
export { resistancesOf } from './resistances'
export { prepareBeam } from './prepare'
export type { PreparedBeam, PreparedCase, PreparedCombination } from './prepare'
export type { Resistances } from './resistances'
export type {
  Beam, BeamLineLoad, BeamPointLoad, BeamRules, CheckName, LoadCase, LoadHeight, LoadParts, Restraint, ServiceLimits,
} from './types'
export type {
  BeamVerification, CaseVerification, EndReaction, SegmentVerification, SizedSection,
} from './result'
