import { ENGINE_VERSION, examineRange, prepareStudy, rankRows } from '#shared/engine/search'
import type { ProjectRole } from '#shared/schemas/api'
import { DEFAULT_BASIS } from '#shared/utils/defaultBasis'
import type { Db } from './client'
import { DEMO_PRACTICE, demoAccounts, demoProjects, type DemoProject } from './demo'
import { hashPasswordPlain } from './passwords'
import { findActiveAccount, insertAccount, type Account } from './queries/accounts'
import { findBasis, saveBasis } from './queries/bases'
import { createPlate, findPlate } from './queries/plates'
import { addMember, createProject } from './queries/projects'
import { finishStudy } from './queries/schemes'
import { insertStudy } from './queries/studies'

export { demoAccounts } from './demo'

type People = Map<ProjectRole, Account>

async function makePeople(db: Db): Promise<People> {
  const practice = await db.insertInto('practices').values({ name: DEMO_PRACTICE }).returning('id').executeTakeFirstOrThrow()
  const people: People = new Map()
  for (const { name, email, password, projectRole } of demoAccounts) {
    const id = await insertAccount(db, {
      practiceId: practice.id, name, email, role: projectRole, isAdministrator: projectRole === null,
      passwordHash: await hashPasswordPlain(password),
    })
    const made = await findActiveAccount(db, id)
    if (projectRole && made) people.set(projectRole, made)
  }
  return people
}

/** The study of a demo project, computed here by the engine as a worker would. */
async function makeStudy(db: Db, engineer: Account, projectId: string, plateId: string, demo: DemoProject): Promise<void> {
  const [plate, basis] = await Promise.all([findPlate(db, plateId), findBasis(db, projectId)])
  if (!plate || !demo.range) return
  const inputs = { plate: plate.document, basis: basis.document, range: demo.range }
  const prepared = prepareStudy(inputs)
  await db.transaction().execute(async (trx) => {
    const studyId = await insertStudy(trx, engineer, {
      projectId, plateId, plateVersion: plate.version, basisVersion: basis.version,
      inputs, engineVersion: ENGINE_VERSION, total: prepared.total,
    })
    await trx.updateTable('studies').set({ started_at: new Date(), state: 'running' }).where('id', '=', studyId).execute()
    const part = examineRange(prepared, 0, prepared.total)
    await finishStudy(trx, studyId, rankRows(part), { ...part.counts, range: prepared.total })
  })
}

async function makeProject(db: Db, people: People, engineer: Account, demo: DemoProject): Promise<void> {
  const projectId = await createProject(db, engineer, demo)
  if (!projectId) return
  for (const role of demo.people) {
    const person = people.get(role)
    if (person && role !== 'engineer') await addMember(db, projectId, person.id, role)
  }
  if (!demo.plate) return
  const where = { projectId, account: engineer }
  const plateId = await createPlate(db, where, demo.plate)
  await saveBasis(db, where, { version: 0, document: DEFAULT_BASIS })
  if (demo.range) await makeStudy(db, engineer, projectId, plateId, demo)
}

/** Fills an empty database with the demo: one practice, one account per role, three projects, one finished study. */
export async function seedDemo(db: Db): Promise<void> {
  const people = await makePeople(db)
  const engineer = people.get('engineer')
  if (!engineer) throw new Error('The demo has no engineer.')
  for (const demo of demoProjects) await makeProject(db, people, engineer, demo)
}
