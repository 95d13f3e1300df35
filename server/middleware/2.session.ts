import { findActiveAccount } from '../database/queries/accounts'

const OPEN = new Set(['POST /api/session', 'GET /api/health'])

/**
 * Who is asking: on each call of the API the session's account is read, so that a session that was
 * revoked or whose account was deactivated is dead at its next request.
 */
export default apiHandler(async (event) => {
  const path = event.path.split('?')[0] ?? ''
  if (!path.startsWith('/api/') || path.startsWith('/api/_')) return
  if (OPEN.has(`${event.method} ${path}`)) return
  const { user, secure } = await getUserSession(event)
  const account = user ? await findActiveAccount(useDb(), user.id) : undefined
  if (account && secure?.sessionVersion === account.sessionVersion) {
    event.context.account = account
    return
  }
  if (user) await clearUserSession(event)
  // Signing out is never refused: who has no session any more is signed out.
  if (event.method === 'DELETE' && path === '/api/session') return
  requireAccount(event)
})
