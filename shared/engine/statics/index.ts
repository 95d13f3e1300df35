export { effectsOf, emptyEffects, stationAt, stationsOf, superpose } from './effects'
export type { Effects, LineLoad, PointLoad } from './effects'
export { fundamentalFrequency, largestMoment, largestSag, largestShear, momentIn, sagAt } from './peaks'
export type { Peak } from './peaks'
