import { SignInSchema, type SessionAccount } from '#shared/schemas/api'
import { findAccountToSignIn, toSessionAccount } from '../database/queries/accounts'
import { recordActivity } from '../database/queries/activity'
import { hashPasswordPlain } from '../database/passwords'

/** Compared with where no account has that e-mail, so that the answer takes as long. */
let nobody: Promise<string> | undefined

/** Signs in. Wrong e-mail and wrong password get the same answer, after the same work. */
export default apiHandler(async (event): Promise<SessionAccount> => {
  const { email, password } = await readDocument(event, SignInSchema)
  const address = getRequestIP(event, { xForwardedFor: process.env.BAYWRIGHT_TRUST_PROXY === 'on' }) ?? 'unknown'
  const counted = await countSignIn(email, address)
  const account = await findAccountToSignIn(useDb(), email)
  nobody ??= hashPasswordPlain(crypto.randomUUID())
  const isRight = await verifyPassword(account?.passwordHash ?? await nobody, password)
  if (!account || !isRight) {
    throw refusal('wrong-credentials', 'E-mail and password do not belong together. Check both and try again.')
  }
  await counted.succeeded()
  await replaceUserSession(event, {
    user: { id: account.id, name: account.name },
    secure: { sessionVersion: account.sessionVersion },
  })
  await recordActivity(useDb(), { practiceId: account.practiceId, accountId: account.id, action: 'session.begun' })
  return toSessionAccount(account)
})
