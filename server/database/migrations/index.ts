import type { Migration } from 'kysely'
import * as accounts from './2026-12-01-accounts'
import * as projects from './2026-12-02-projects'
import * as studies from './2026-12-03-studies'
import * as answers from './2026-12-04-answers'

/** Static imports, so that one bundled file holds them all. The names are the order. */
export const MIGRATIONS: Record<string, Migration> = {
  '2026-12-01-accounts': accounts,
  '2026-12-02-projects': projects,
  '2026-12-03-studies': studies,
  '2026-12-04-answers': answers,
}
