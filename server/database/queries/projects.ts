import { sql } from 'kysely'
import type { ProjectDetail, ProjectRole, ProjectSummary, StudyProgress } from '#shared/schemas/api'
import type { Plate } from '#shared/schemas/plate'
import type { Db } from '../client'
import type { Account } from './accounts'
import type { Lightest } from '../schema'
import { recordActivity } from './activity'
import { listPlates } from './plates'
import { listStudies } from './studies'

export interface ProjectAccess { id: string, practiceId: string, role: ProjectRole }

/** The role of an account on a project; undefined where the project is missing or not theirs. */
export function findProjectAccess(db: Db, accountId: string, projectId: string): Promise<ProjectAccess | undefined> {
  return db.selectFrom('project_members as member')
    .innerJoin('projects as project', 'project.id', 'member.project_id')
    .select(['project.id', 'project.practice_id as practiceId', 'member.role'])
    .where('member.account_id', '=', accountId).where('project.id', '=', projectId)
    .executeTakeFirst()
}

interface ProjectLine {
  id: string
  number: string
  name: string
  role: ProjectRole
  changed_at: Date
  outline: Plate['outline'] | null
  voids: Plate['voids'] | null
  area: number | null
  study_number: number | null
  study_state: StudyProgress['state'] | null
  examined: number | null
  total: number | null
  lightest: Lightest | null
}

/** "no plate yet", "study 2 running, 40 of 120 examined", "study 1 finished". */
function stateInWords(line: ProjectLine): string {
  if (line.outline === null) return 'no plate yet'
  if (line.study_number === null) return 'no study yet'
  const study = `study ${line.study_number}`
  if (line.study_state === 'queued') return `${study} waiting`
  if (line.study_state === 'running') return `${study} running, ${line.examined ?? 0} of ${line.total ?? 0} examined`
  return `${study} ${line.study_state ?? ''}`
}

/** The projects of an account, last changed first. `lightest.depth` is the deepest beam, mm. */
export async function listProjects(db: Db, accountId: string): Promise<ProjectSummary[]> {
  const { rows } = await sql<ProjectLine>`
    select project.id, project.number, project.name, member.role, project.changed_at,
      plate.outline, plate.voids, plate.area,
      study.number as study_number, study.state as study_state, study.examined, study.total, best.lightest
    from project_members member
    join projects project on project.id = member.project_id
    left join lateral (
      select document -> 'outline' as outline, document -> 'voids' as voids, area
      from plates where project_id = project.id order by created_at, id limit 1
    ) plate on true
    left join lateral (
      select number, state, total, (progress ->> 'examined')::int as examined
      from studies where project_id = project.id order by number desc limit 1
    ) study on true
    left join lateral (
      select lightest from studies
      where project_id = project.id and state = 'finished' order by number desc limit 1
    ) best on true
    where member.account_id = ${accountId}
    order by project.changed_at desc, project.number`.execute(db)
  return rows.map(line => ({
    id: line.id,
    number: line.number,
    name: line.name,
    role: line.role,
    outline: line.outline,
    voids: (line.voids ?? []).map(({ x, y, width, height }) => ({ x, y, width, height })),
    floorArea: line.area,
    state: stateInWords(line),
    lightest: line.lightest,
    changedAt: line.changed_at.toISOString(),
  }))
}

/** A project as one of its members sees it; undefined where it is missing or not theirs. */
export async function findProject(db: Db, accountId: string, projectId: string): Promise<ProjectDetail | undefined> {
  const access = await findProjectAccess(db, accountId, projectId)
  if (!access) return undefined
  const [project, people, plates, studies, basis] = await Promise.all([
    db.selectFrom('projects').select(['id', 'number', 'name']).where('id', '=', projectId).executeTakeFirstOrThrow(),
    db.selectFrom('project_members as member').innerJoin('accounts as account', 'account.id', 'member.account_id')
      .select(['account.id', 'account.name', 'account.email', 'member.role'])
      .where('member.project_id', '=', projectId).orderBy('member.added_at').orderBy('account.name').execute(),
    listPlates(db, projectId),
    listStudies(db, projectId),
    db.selectFrom('bases').select(({ fn }) => fn.max('version').as('version')).where('project_id', '=', projectId).executeTakeFirst(),
  ])
  return { ...project, role: access.role, people, plates, studies, basisVersion: basis?.version ?? 0 }
}

/** Makes a project with its maker as engineer; undefined where the practice has that number already. */
export async function createProject(
  db: Db, account: Account, { number, name }: { number: string, name: string },
): Promise<string | undefined> {
  return await db.transaction().execute(async (trx) => {
    const made = await trx.insertInto('projects')
      .values({ practice_id: account.practiceId, number, name })
      .onConflict(conflict => conflict.columns(['practice_id', 'number']).doNothing())
      .returning('id').executeTakeFirst()
    if (!made) return undefined
    await trx.insertInto('project_members').values({ project_id: made.id, account_id: account.id, role: 'engineer' }).execute()
    await recordActivity(trx, {
      practiceId: account.practiceId, projectId: made.id, accountId: account.id,
      action: 'project.created', subject: { number, name },
    })
    return made.id
  })
}

/** Puts an account on a project; a role that it had there is replaced. */
export async function addMember(db: Db, projectId: string, accountId: string, role: ProjectRole): Promise<void> {
  await db.insertInto('project_members')
    .values({ project_id: projectId, account_id: accountId, role })
    .onConflict(conflict => conflict.columns(['project_id', 'account_id']).doUpdateSet({ role }))
    .execute()
}
