import { actionsAndService } from './actions-and-service'
import { criticalMoments } from './critical-moments'
import { resistanceTables } from './resistance-tables'
import { steelBuildingsInEurope } from './steel-buildings-in-europe'
import type { PublishedCheck } from './types'

/** Every published check that the engine covers, computed now by this build. */
export function publishedChecks(): PublishedCheck[] {
  return [...steelBuildingsInEurope(), ...resistanceTables(), ...criticalMoments(), ...actionsAndService()]
}
