/** What the API takes and gives, shared by routes, pages and tests. */
import { z } from 'zod'
import { BasisSchema, type Basis } from './basis'
import { PlateSchema, type Plate } from './plate'
import { RangeSchema, type Range } from './range'
import type { Direction, SchemeMember, StudyCounts } from './study'

/** One closed list: every refusal of the API carries one of these in `data.code`. */
export const API_ERROR_CODES = [
  'malformed', 'not-signed-in', 'wrong-credentials', 'not-allowed', 'not-found', 'stale-version',
  'cannot-be-framed', 'too-many-tries', 'foreign-origin', 'not-ready', 'internal',
  'last-engineer',
] as const
export type ApiErrorCode = typeof API_ERROR_CODES[number]
export interface ApiErrorBody { code: ApiErrorCode, message: string, path?: string }

export const PROJECT_ROLES = ['engineer', 'architect', 'cost-planner', 'checker'] as const
export const ProjectRoleSchema = z.enum(PROJECT_ROLES)
export type ProjectRole = z.infer<typeof ProjectRoleSchema>

export const SignInSchema = z.strictObject({
  email: z.email().max(254),
  password: z.string().min(1).max(200),
})

export interface SessionAccount {
  id: string
  name: string
  email: string
  initials: string
  isAdministrator: boolean
  /** What the account is in the practice; null for an administrator without an engineering role. */
  role: ProjectRole | null
}

export const NewProjectSchema = z.strictObject({
  number: z.string().trim().min(1).max(20),
  name: z.string().trim().min(1).max(120),
})
/** Puts an account of the practice on a project, or gives it another role there. */
export const ProjectPersonSchema = z.strictObject({
  email: z.string().trim().toLowerCase().max(254)
    .pipe(z.email('This is not an e-mail address; write it as name@practice.example')),
  role: ProjectRoleSchema,
})
export const NewPlateSchema = z.strictObject({ document: PlateSchema })
export const SavePlateSchema = z.strictObject({ version: z.int().min(1), document: PlateSchema })
export const SaveBasisSchema = z.strictObject({ version: z.int().min(0), document: BasisSchema })
export const NewStudySchema = z.strictObject({ plateId: z.uuid(), range: RangeSchema })

export interface ProjectSummary {
  id: string
  number: string
  name: string
  role: ProjectRole
  /** Outline of the first plate for the table's picture; null without a plate. */
  outline: [number, number][] | null
  voids: { x: number, y: number, width: number, height: number }[]
  /** Gross, inside the outline, m². */
  floorArea: number | null
  /** In words: "no plate yet", "study 2 running, 40 of 120 examined", "study 1 finished". */
  state: string
  lightest: { massPerArea: number, depth: number } | null
  changedAt: string
}

export interface PlateSummary {
  id: string
  name: string
  version: number
  savedAt: string
  savedBy: string
  /** Gross, inside the outline, m². */
  area: number
}

/** One line of a plate's history. */
export interface PlateVersionSummary { version: number, savedAt: string, savedBy: string }

export interface StudySummary {
  id: string
  number: number
  plateId: string
  plateName: string
  plateVersion: number
  basisVersion: number
  state: StudyState
  counts: StudyCounts | null
  total: number
  lightest: { massPerArea: number, depth: number } | null
  startedBy: string
  createdAt: string
  finishedAt: string | null
}

/** Someone on a project; `id` is the account's. */
export interface ProjectPerson { id: string, name: string, email: string, role: ProjectRole }

export interface ProjectDetail {
  id: string
  number: string
  name: string
  role: ProjectRole
  people: ProjectPerson[]
  plates: PlateSummary[]
  studies: StudySummary[]
  basisVersion: number
}

export interface PlateRecord {
  id: string
  projectId: string
  version: number
  document: Plate
  savedAt: string
  savedBy: string
}

export interface BasisRecord {
  projectId: string
  version: number
  document: Basis
  savedAt: string | null
  savedBy: string | null
}

export type StudyState = 'queued' | 'running' | 'finished' | 'cancelled' | 'failed'

export interface StudyProgress {
  state: StudyState
  examined: number
  total: number
  counts: StudyCounts
  /** Lightest so far. */
  best: { number: number, massPerArea: number, depth: number, baysX: number[], baysY: number[] } | null
  /** Lightest mass found after so many arrangements, for the curve. */
  history: { examined: number, massPerArea: number }[]
  secondsLeft: number | null
  /** In words, where the study failed. */
  failure: string | null
}

export interface StudyRecord extends StudySummary {
  projectId: string
  range: Range
  plate: Plate
  basis: Basis
  engineVersion: string
  startedAt: string | null
  progress: StudyProgress
  /** True where the plate or basis has been saved since. */
  stale: { plate: number | null, basis: number | null }
}

/** A row of the ranked table. */
export interface SchemeRow {
  rank: number
  number: number
  /** Key within the study: arrangement number and depth cap. */
  key: string
  baysX: number[]
  baysY: number[]
  primaryDirection: Direction | 'mixed'
  divisions: number
  /** Index of the slab system tried; 0 where only the plate's own is. */
  slab: number
  depthCap: number | null
  beamMass: number
  columnMass: number
  mass: number
  massPerArea: number
  depth: number
  pieces: number
  distinctSections: number
  onTradeOffLine: boolean
  lowestFrequency: number
  /** Number of beams by governing check. */
  governing: Record<string, number>
}

/** What may be asked of the ranked table; texts, since they come in an address. */
export const SchemeQuerySchema = z.strictObject({
  sort: z.enum(['mass', 'depth', 'pieces', 'distinctSections']).default('mass'),
  order: z.enum(['asc', 'desc']).default('asc'),
  /** Deepest beam, mm. */
  depthAtMost: z.coerce.number().min(0).max(10_000).optional(),
  direction: z.enum(['x', 'y', 'mixed']).optional(),
  /** Numbers with commas between them. */
  divisions: z.string().regex(/^\d{1,2}(,\d{1,2}){0,19}$/).optional(),
  tradeOff: z.enum(['true', 'false']).optional(),
  /** `next` of the page before. */
  after: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
})
export type SchemeQuery = z.infer<typeof SchemeQuerySchema>

export interface SchemePage { rows: SchemeRow[], total: number, next: string | null }

/** Chart points as columns, so that thousands stay small. */
export interface SchemePoints {
  key: string[]
  number: number[]
  massPerArea: number[]
  depth: number[]
  /** Index of the slab system tried. */
  slab: number[]
  onTradeOffLine: boolean[]
}

/** A member of an opened scheme: the contract's fields and what the page shows beside them. */
export interface SchemeMemberDetail extends SchemeMember {
  /** Where it is, in grid words: "B / 4–5". */
  place: string
  /** mm; storey height for columns. */
  length: number
  /** kg */
  mass: number
  grade: string
  utilisations: Record<string, number | null>
  /** Marks of the members that carry it. */
  carriedBy: string[]
  /** Marks of the beams that it carries. */
  carries: string[]
  /** kN, unfactored; null for columns. */
  reactions: { from: { permanent: number, variable: number }, to: { permanent: number, variable: number } } | null
  frequency: number | null
  /** Members alike: same section, length and loads. */
  alike: number
  /** Columns only: lifts from the base up, each with its governing length. kN, kNm, mm. */
  lifts?: ColumnLiftDetail[]
}

export interface ColumnLiftDetail {
  fromLevel: number
  toLevel: number
  section: string
  utilisation: number
  NEd: number
  MyEd: number
  MzEd: number
  NbYRd: number
  NbZRd: number
  MbRd: number
  MczRd: number
  LcrY: number
  LcrZ: number
  method: string
  combination: string
  /** Axial, about y, about z: what the expression adds up. */
  parts: [number, number, number]
}

export interface ColumnLoad {
  mark: string
  place: string
  at: [number, number]
  section: string | null
  /** kN at the base, unfactored, all floors and roof. */
  permanent: number
  variable: number
  /** kN, factored as the basis says. */
  ultimate: number
}

export interface SchemeDetail extends Omit<SchemeRow, 'governing'> {
  studyId: string
  projectId: string
  studyNumber: number
  total: number
  plate: Plate
  basis: Basis
  plateVersion: number
  basisVersion: number
  engineVersion: string
  gridX: { label: string, at: number }[]
  gridY: { label: string, at: number }[]
  slabDepth: number
  slabArea: number
  members: SchemeMemberDetail[]
  columnLoads: ColumnLoad[]
  /** Largest tie force of each column line, kN; EN 1991-1-7 A.5.1. An output, not verified but for ties. */
  tieForces: { line: string, axis: Direction, place: 'internal' | 'perimeter', force: number }[]
  /** Surface to protect against fire on one floor, m²: beams under slab on three sides, the rest on four. */
  protectionArea: { beams: number, columns: number }
  /** kg, mm */
  heaviestPiece: number
  longestPiece: number
  residual: number
  governing: Record<string, number>
  warnings: string[]
  /** Values of the basis that replace national ones, in words. */
  overrides: string[]
}
