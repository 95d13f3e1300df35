import type { PlateRecord, PlateSummary, PlateVersionSummary } from '#shared/schemas/api'
import type { Plate } from '#shared/schemas/plate'
import type { Db } from '../client'
import type { Account } from './accounts'
import { recordActivity } from './activity'

/** Area inside an outline, m², for a polygon in mm (shoelace). */
export function outlineArea(outline: Plate['outline']): number {
  let twice = 0
  outline.forEach(([x, y], i) => {
    const [nextX, nextY] = outline[(i + 1) % outline.length] ?? [x, y]
    twice += x * nextY - nextX * y
  })
  return Math.abs(twice) / 2 / 1_000_000
}

function plateRecords(db: Db) {
  return db.selectFrom('plates as plate').innerJoin('accounts as account', 'account.id', 'plate.saved_by')
    .select([
      'plate.id', 'plate.project_id as projectId', 'plate.version', 'plate.document',
      'plate.saved_at', 'account.name as savedBy',
    ])
}

const withIso = <T extends { saved_at: Date }>({ saved_at, ...rest }: T) => ({ ...rest, savedAt: saved_at.toISOString() })

/** The plates of a project, oldest first. */
export async function listPlates(db: Db, projectId: string): Promise<PlateSummary[]> {
  const rows = await db.selectFrom('plates as plate').innerJoin('accounts as account', 'account.id', 'plate.saved_by')
    .select(['plate.id', 'plate.name', 'plate.version', 'plate.saved_at', 'account.name as savedBy', 'plate.area'])
    .where('plate.project_id', '=', projectId).orderBy('plate.created_at').orderBy('plate.id')
    .execute()
  return rows.map(withIso)
}

/** A plate in its present version. */
export async function findPlate(db: Db, id: string): Promise<PlateRecord | undefined> {
  const row = await plateRecords(db).where('plate.id', '=', id).executeTakeFirst()
  return row && withIso(row)
}

/** The versions of a plate, newest first. */
export async function listPlateVersions(db: Db, id: string): Promise<PlateVersionSummary[]> {
  const rows = await db.selectFrom('plate_versions as plate').innerJoin('accounts as account', 'account.id', 'plate.saved_by')
    .select(['plate.version', 'plate.saved_at', 'account.name as savedBy'])
    .where('plate.plate_id', '=', id).orderBy('plate.version', 'desc').execute()
  return rows.map(withIso)
}

/** A plate as it was in one of its versions. */
export async function findPlateVersion(db: Db, id: string, version: number): Promise<PlateRecord | undefined> {
  const row = await db.selectFrom('plate_versions as old')
    .innerJoin('plates as plate', 'plate.id', 'old.plate_id')
    .innerJoin('accounts as account', 'account.id', 'old.saved_by')
    .select([
      'plate.id', 'plate.project_id as projectId', 'old.version', 'old.document', 'old.saved_at', 'account.name as savedBy',
    ])
    .where('old.plate_id', '=', id).where('old.version', '=', version).executeTakeFirst()
  return row && withIso(row)
}

interface Where { projectId: string, account: Account }

/** Stores a plate as version 1 and returns its id. */
export async function createPlate(db: Db, { projectId, account }: Where, document: Plate): Promise<string> {
  return await db.transaction().execute(async (trx) => {
    const stored = { document: JSON.stringify(document), saved_by: account.id, version: 1 }
    const { id } = await trx.insertInto('plates')
      .values({ ...stored, project_id: projectId, name: document.name, area: outlineArea(document.outline) })
      .returning('id').executeTakeFirstOrThrow()
    await trx.insertInto('plate_versions').values({ ...stored, plate_id: id }).execute()
    await recordActivity(trx, {
      practiceId: account.practiceId, projectId, accountId: account.id,
      action: 'plate.created', subject: { plateId: id, name: document.name },
    })
    return id
  })
}

/**
 * Saves over version `version`, which becomes version + 1. False, and nothing stored, where another
 * version is in place by now.
 */
export async function savePlate(
  db: Db, { projectId, account }: Where, plate: { id: string, version: number, document: Plate },
): Promise<boolean> {
  return await db.transaction().execute(async (trx) => {
    const now = new Date()
    const stored = { document: JSON.stringify(plate.document), saved_at: now, saved_by: account.id, version: plate.version + 1 }
    const saved = await trx.updateTable('plates')
      .set({ ...stored, name: plate.document.name, area: outlineArea(plate.document.outline) })
      .where('id', '=', plate.id).where('version', '=', plate.version)
      .returning('id').executeTakeFirst()
    if (!saved) return false
    await trx.insertInto('plate_versions').values({ ...stored, plate_id: plate.id }).execute()
    await recordActivity(trx, {
      practiceId: account.practiceId, projectId, accountId: account.id,
      action: 'plate.saved', subject: { plateId: plate.id, version: plate.version + 1 },
    })
    return true
  })
}
