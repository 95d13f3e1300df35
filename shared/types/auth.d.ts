/** What the sealed session cookie holds. */
declare module '#auth-utils' {
  interface User {
    id: string
    name: string
  }

  interface SecureSessionData {
    /** Compared with the account's on each call. */
    sessionVersion: number
  }
}

export {}
