/** The tables as Kysely sees them. Migrations make them; this file only types them. */
import type { ColumnType, Generated } from 'kysely'
import type { AnswerState } from '#shared/schemas/answers'
import type { Basis } from '#shared/schemas/basis'
import type { Plate } from '#shared/schemas/plate'
import type { ProjectRole, SchemeRow, StudyProgress, StudyState } from '#shared/schemas/api'
import type { StudyInput } from '#shared/schemas/study'

type WhenDefault = ColumnType<Date, Date | string | undefined, Date | string>
type WhenMaybe = ColumnType<Date | null, Date | string | null | undefined, Date | string | null>
/** A jsonb column: read as a document, written as JSON text. */
type Document<T> = ColumnType<T, string, string>
type DocumentMaybe<T> = ColumnType<T | null, string | null | undefined, string | null>

export interface PracticesTable {
  id: Generated<string>
  name: string
  created_at: WhenDefault
}

export interface AccountsTable {
  id: Generated<string>
  practice_id: string
  name: string
  /** Lower case. */
  email: string
  password_hash: string
  /** What the person is in the practice; null for an administrator without an engineering role. */
  role: ProjectRole | null
  /** Compared with the session's on each call: raising it ends every open session. */
  session_version: Generated<number>
  is_administrator: Generated<boolean>
  deactivated_at: WhenMaybe
  created_at: WhenDefault
}

export interface ProjectsTable {
  id: Generated<string>
  practice_id: string
  number: string
  name: string
  created_at: WhenDefault
  changed_at: WhenDefault
}

export interface ProjectMembersTable {
  project_id: string
  account_id: string
  role: ProjectRole
  added_at: WhenDefault
}

export interface PlatesTable {
  id: Generated<string>
  project_id: string
  name: string
  version: number
  /** Gross area inside the outline, m². */
  area: number
  document: Document<Plate>
  saved_at: WhenDefault
  saved_by: string
  created_at: WhenDefault
}

export interface PlateVersionsTable {
  plate_id: string
  version: number
  document: Document<Plate>
  saved_at: WhenDefault
  saved_by: string
}

export interface BasesTable {
  project_id: string
  version: number
  document: Document<Basis>
  saved_at: WhenDefault
  saved_by: string
}

/** Lightest of a study: kg/m², mm. */
export interface Lightest { massPerArea: number, depth: number }

export interface StudiesTable {
  id: Generated<string>
  project_id: string
  number: number
  plate_id: string
  plate_name: string
  plate_version: number
  basis_version: number
  /** Never changed after the study was asked for. */
  inputs: Document<StudyInput>
  engine_version: string
  state: Generated<StudyState>
  /** Arrangements in the range. */
  total: number
  progress: Document<StudyProgress>
  /** Arrangements in a part; null until the study is cut. */
  part_size: number | null
  parts_total: number | null
  parts_done: Generated<number>
  lightest: DocumentMaybe<Lightest>
  started_by: string
  created_at: WhenDefault
  started_at: WhenMaybe
  finished_at: WhenMaybe
  /** Last word to those who watch; keeps them to five a second. */
  told_at: WhenMaybe
}

export interface StudyPartsTable {
  study_id: string
  number: number
  /** What the engine found, as JSON; null once it has been merged into another part. */
  result: string | null
  done_at: WhenDefault
}

export interface SchemesTable {
  study_id: string
  key: string
  number: number
  rank: number
  mass: number
  mass_per_area: number
  depth: number
  pieces: number
  distinct_sections: number
  primary_direction: SchemeRow['primaryDirection']
  divisions: number
  depth_cap: number | null
  on_trade_off_line: boolean
  summary: Document<SchemeRow>
}

/** Questions about a ranked study that a worker answers. */
export interface AnswersTable {
  study_id: string
  /** As `questionName` writes it. */
  question: string
  state: Generated<AnswerState>
  result: DocumentMaybe<unknown>
  failure: ColumnType<string | null, string | null | undefined, string | null>
  engine_version: ColumnType<string | null, string | null | undefined, string | null>
  asked_by: string
  asked_at: WhenDefault
  answered_at: WhenMaybe
}

export interface ActivityTable {
  id: Generated<string>
  practice_id: string
  project_id: string | null
  account_id: string | null
  /** What was done, e.g. `plate.saved`. */
  action: string
  subject: Document<Record<string, string | number>>
  at: WhenDefault
}

export interface RateLimitsTable { key: string, points: number, expire: string | null }

export interface Database {
  practices: PracticesTable
  accounts: AccountsTable
  projects: ProjectsTable
  project_members: ProjectMembersTable
  plates: PlatesTable
  plate_versions: PlateVersionsTable
  bases: BasesTable
  studies: StudiesTable
  study_parts: StudyPartsTable
  schemes: SchemesTable
  answers: AnswersTable
  activity: ActivityTable
  rate_limits: RateLimitsTable
}
