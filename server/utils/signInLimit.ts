import { createHash } from 'node:crypto'
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible'
import { useClient } from './db'
import { refusal } from './refusal'

/** Failed sign-ins that are let through: of one account from one address, and from one address. */
const PER_ACCOUNT = { points: 8, duration: 15 * 60 }
const PER_ADDRESS = { points: 60, duration: 15 * 60 }

function limiter(keyPrefix: string, limit: { points: number, duration: number }) {
  return new RateLimiterPostgres({
    storeClient: useClient().pool, storeType: 'pool', tableName: 'rate_limits', tableCreated: true,
    clearExpiredByTimeout: true, keyPrefix, ...limit,
  })
}

let limiters: { account: RateLimiterPostgres, address: RateLimiterPostgres } | undefined

const keyOf = (...parts: string[]) => createHash('sha256').update(parts.join('\n')).digest('base64url')

/**
 * Counts a try before the password is looked at, so that tries side by side are counted too; throws
 * 429 over the limit. `succeeded` takes the count back.
 */
export async function countSignIn(email: string, address: string): Promise<{ succeeded: () => Promise<void> }> {
  limiters ??= { account: limiter('sign-in-account', PER_ACCOUNT), address: limiter('sign-in-address', PER_ADDRESS) }
  const { account, address: byAddress } = limiters
  const keys = { account: keyOf(email.toLowerCase(), address), address: keyOf(address) }
  try {
    await byAddress.consume(keys.address)
    await account.consume(keys.account)
  } catch (error) {
    if (!(error instanceof RateLimiterRes)) throw error
    const minutes = Math.max(1, Math.ceil(error.msBeforeNext / 60_000))
    throw refusal('too-many-tries', `Too many failed sign-ins. Wait ${minutes} min and try again.`, {
      retryAfter: Math.ceil(error.msBeforeNext / 1000),
    })
  }
  return {
    succeeded: async () => {
      await Promise.all([account.delete(keys.account), byAddress.reward(keys.address)])
    },
  }
}
