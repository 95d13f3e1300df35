import type { Account } from '../database/queries/accounts'

declare module 'h3' {
  interface H3EventContext {
    /** Who is signed in; set by server/middleware/2.session.ts. */
    account?: Account
  }
}

export {}
