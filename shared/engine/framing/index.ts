export { type FramingRules, frameArrangement, isRejected } from './frame'
export { isJudgedByGrid, slabReason } from './slabPreview'
export {
  type BeamLoads, type DemandRules, beamDemand, carriedArea, mergedSpots, mergedStretches, oneSidedCases, reactionsOf,
} from './demand'
export type {
  Arrangement, BeamKind, Frame, FrameBeam, FrameColumn, FramingRejection, RegionFraming, Rejected, SpotLoad, StretchLoad, Support,
} from './types'
