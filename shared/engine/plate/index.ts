export { checkGrid, checkPlate, runsThrough, type PlateOffer, type PlateProblem, type PlateProblemCode } from './check'
export {
  type BayGrid, type BeyondOwner, type Grid, type Link, bayBox, bayGrid, baysBeside, hasLink, intervalOf, isCrossing, isFull,
  isOuterLink, nearestCrossing, ownerBeyond,
} from './bays'
export {
  FLOOR_VARIABLE, PERMANENT, addScaled, loadKindsOf, type LoadKinds, type LoadZoneModel, type VariableKind,
} from './loads'
export {
  type LineLoadModel, type PlateModel, type RegionModel, type VoidModel, appliedLoad, lineLoadLength, plateModel, slabAreaWithin, zoneAt,
} from './model'
export {
  type OutlineEdge, coveredArea, isInsideOrOn, isWhollyInside, outlineArea, outlineEdges, outlineFault, outlineRectangles,
} from './outline'
export {
  type Axis, type Interval, type Point, type Rectangle, TOLERANCE, across, along, areaOf, distinctRising, intersection,
  isStrictlyInside, overlaps, rectangleFrom, rectangleOf, unionOf, withoutIntervals,
} from './rectangles'
