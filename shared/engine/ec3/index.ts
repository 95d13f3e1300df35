export {
  CLASS_LIMITS, classInBending, classInCompression, epsilon, flangeClass, flangeOutstand, webClassInBending,
  webClassInCompression, webStraightDepth,
} from './classification'
export type { SectionClass } from './classification'
export { bendingModulus, bendingResistance, bendingResistanceWithShear, exhaustingShear, highShearFactor, webModulus } from './bending'
export {
  needsShearBucklingCheck, plasticShearResistance, shearArea, shearBucklingFactor, shearBucklingResistance, webSlenderness,
} from './shear'
export { IMPERFECTION, curveFor } from './curves'
export {
  KC_CENTRAL_LOAD, KC_UNIFORM_LOAD, kcFromC1, kcLinear, ltbCurve, ltbModification, ltbPhi, ltbReduction,
  ltbReductionModified, ltbResistance, ltbSlenderness,
} from './lateral-torsional'
export type { LtbCurve, LtbMethod } from './lateral-torsional'
export {
  c1Linear, c1QuarterPoints, c1c2TwoLoads, criticalMomentClosed, criticalMomentUniform,
} from './critical-moment-closed'
export { ELEMENTS, buildMesh, criticalFactor, criticalMoment, rayleighFactor } from './critical-moment'
export type { BucklingLoads, BucklingMesh, BucklingPiece, CriticalMoment, CriticalMomentInput } from './critical-moment'
export { eulerLoad, flexuralBuckling, flexuralBucklingCurve, flexuralReduction } from './compression'
export type { Axis, FlexuralBuckling } from './compression'
export { cmLinear, interactionAnnexB } from './interaction'
export type { Interaction, InteractionInput } from './interaction'
export { criticalTemperature, fireReduction, sectionFactor } from './fire'
export { tensionResistance, tieForce } from './ties'
