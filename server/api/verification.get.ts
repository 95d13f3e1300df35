import { ENGINE_VERSION } from '#shared/engine/search'
import { publishedChecks } from '#shared/engine/verification'

/** The published checks, computed by this build at this moment. */
export default apiHandler((event) => {
  requireAccount(event)
  return { engineVersion: ENGINE_VERSION, checks: publishedChecks() }
})
