import type { SessionAccount } from '#shared/schemas/api'
import { toSessionAccount } from '../database/queries/accounts'

/** Who is signed in. */
export default apiHandler((event): SessionAccount => toSessionAccount(requireAccount(event)))
