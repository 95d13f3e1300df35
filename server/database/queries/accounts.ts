import { sql } from 'kysely'
import type { ProjectRole, SessionAccount } from '#shared/schemas/api'
import type { Db } from '../client'

export interface Account {
  id: string
  practiceId: string
  name: string
  email: string
  role: ProjectRole | null
  sessionVersion: number
  isAdministrator: boolean
}

const columns = [
  'id', 'practice_id as practiceId', 'name', 'email', 'role',
  'session_version as sessionVersion', 'is_administrator as isAdministrator',
] as const

/** The account of that id, unless it was deactivated. */
export function findActiveAccount(db: Db, id: string): Promise<Account | undefined> {
  return db.selectFrom('accounts').select(columns)
    .where('id', '=', id).where('deactivated_at', 'is', null)
    .executeTakeFirst()
}

/** The account that signs in with `email`, whatever its case, with its password's hash. */
export function findAccountToSignIn(db: Db, email: string): Promise<Account & { passwordHash: string } | undefined> {
  return db.selectFrom('accounts').select([...columns, 'password_hash as passwordHash'])
    .where('email', '=', email.toLowerCase()).where('deactivated_at', 'is', null)
    .executeTakeFirst()
}

/** Ends every open session of the account at its next call. */
export async function endSessions(db: Db, id: string): Promise<void> {
  await db.updateTable('accounts').set({ session_version: sql`session_version + 1` }).where('id', '=', id).execute()
}

export interface NewAccount {
  practiceId: string
  name: string
  email: string
  passwordHash: string
  role: ProjectRole | null
  isAdministrator?: boolean
}

/** Adds an account and returns its id; the e-mail is kept in lower case. */
export async function insertAccount(db: Db, account: NewAccount): Promise<string> {
  const { id } = await db.insertInto('accounts').values({
    practice_id: account.practiceId,
    name: account.name,
    email: account.email.toLowerCase(),
    password_hash: account.passwordHash,
    role: account.role,
    is_administrator: account.isAdministrator ?? false,
  }).returning('id').executeTakeFirstOrThrow()
  return id
}

/** First letters of the first and last word of a name, e.g. "DE". */
function initialsOf(name: string): string {
  const words = name.split(/\s+/).filter(Boolean)
  const ends = words.length > 1 ? [words[0], words.at(-1)] : words
  return ends.map(word => [...(word ?? '')][0] ?? '').join('').toUpperCase()
}

/** What the pages may know of the account that is signed in. */
export function toSessionAccount(account: Account): SessionAccount {
  const { id, name, email, isAdministrator, role } = account
  return { id, name, email, initials: initialsOf(name), isAdministrator, role }
}
