export { E, G, GRADES, GRAVITY, POISSON, STEEL_DENSITY, yieldStrength } from './steel'
export type { Grade, YieldRule } from './steel'
