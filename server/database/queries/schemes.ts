import { sql, type Expression, type SqlBool } from 'kysely'
import type { SchemePage, SchemePoints, SchemeQuery, SchemeRow } from '#shared/schemas/api'
import type { StudyCounts } from '#shared/schemas/study'
import type { Db } from '../client'
import { PROGRESS_CHANNEL, notify } from '../queue'

/** Rows in one statement. */
const BATCH = 500
/** Largest value of PostgreSQL's integer. */
const LARGEST_INTEGER = 2_147_483_647
/** Points that a chart takes. */
const MOST_POINTS = 20_000

const SORT_COLUMNS = {
  mass: 'mass', depth: 'depth', pieces: 'pieces', distinctSections: 'distinct_sections',
} as const

/** Stores the ranked schemes and ends the study, in the caller's transaction. */
export async function finishStudy(trx: Db, studyId: string, ranked: readonly SchemeRow[], counts: StudyCounts): Promise<void> {
  await trx.deleteFrom('schemes').where('study_id', '=', studyId).execute()
  for (let from = 0; from < ranked.length; from += BATCH) {
    await trx.insertInto('schemes').values(ranked.slice(from, from + BATCH).map(row => ({
      study_id: studyId,
      key: row.key,
      number: row.number,
      rank: row.rank,
      mass: row.mass,
      mass_per_area: row.massPerArea,
      depth: row.depth,
      pieces: row.pieces,
      distinct_sections: row.distinctSections,
      primary_direction: row.primaryDirection,
      divisions: row.divisions,
      depth_cap: row.depthCap,
      on_trade_off_line: row.onTradeOffLine,
      summary: JSON.stringify(row),
    }))).execute()
  }
  const lightest = ranked[0]
  const figures = lightest && { massPerArea: lightest.massPerArea, depth: lightest.depth }
  const best = lightest && figures
    ? { ...figures, number: lightest.number, baysX: lightest.baysX, baysY: lightest.baysY }
    : null
  await trx.updateTable('studies').set({
    state: 'finished',
    finished_at: sql`clock_timestamp()`,
    lightest: figures ? JSON.stringify(figures) : null,
    progress: sql`progress || ${JSON.stringify({
      state: 'finished', secondsLeft: 0, counts, examined: counts.examined, best,
    })}::jsonb`,
  }).where('id', '=', studyId).execute()
  await trx.deleteFrom('study_parts').where('study_id', '=', studyId).execute()
  await notify(trx, PROGRESS_CHANNEL, studyId)
}

/** Where a page ended: the value of its sort column and the rank, which no two rows share. */
interface Place { value: number, rank: number }

const encodePlace = ({ value, rank }: Place) => Buffer.from(JSON.stringify([value, rank])).toString('base64url')

/** Undefined where the text is none of ours. */
export function decodePlace(text: string): Place | undefined {
  try {
    const read: unknown = JSON.parse(Buffer.from(text, 'base64url').toString())
    if (!Array.isArray(read) || read.length !== 2) return undefined
    const [value, rank] = read as unknown[]
    if (typeof value !== 'number' || !Number.isFinite(value) || typeof rank !== 'number') return undefined
    if (!Number.isInteger(rank) || rank < 0 || rank > LARGEST_INTEGER) return undefined
    return { value, rank }
  } catch {
    return undefined
  }
}

function filtered(db: Db, studyId: string, query: SchemeQuery) {
  return db.selectFrom('schemes').where(({ eb, and }) => {
    const all: Expression<SqlBool>[] = [eb('study_id', '=', studyId)]
    if (query.depthAtMost !== undefined) all.push(eb('depth', '<=', query.depthAtMost))
    if (query.direction) all.push(eb('primary_direction', '=', query.direction))
    if (query.divisions) all.push(eb('divisions', 'in', query.divisions.split(',').map(Number)))
    if (query.tradeOff) all.push(eb('on_trade_off_line', '=', query.tradeOff === 'true'))
    return and(all)
  })
}

/** One page of the ranked table, by keyset; `after` is the place that the page before ended at. */
export async function listSchemes(db: Db, studyId: string, query: SchemeQuery, after?: Place): Promise<SchemePage> {
  const column = SORT_COLUMNS[query.sort]
  let rows = filtered(db, studyId, query).select(['summary', column, 'rank'])
  if (after) {
    const beyond = sql.raw(query.order === 'asc' ? '>' : '<')
    rows = rows.where(sql<SqlBool>`(${sql.ref(column)}, rank) ${beyond} (${after.value}::float8, ${after.rank}::int)`)
  }
  const [page, count] = await Promise.all([
    rows.orderBy(column, query.order).orderBy('rank', query.order).limit(query.limit + 1).execute(),
    filtered(db, studyId, query).select(({ fn }) => fn.countAll<string>().as('count')).executeTakeFirstOrThrow(),
  ])
  const shown = page.slice(0, query.limit)
  const last = shown.at(-1)
  return {
    rows: shown.map(row => row.summary),
    total: Number(count.count),
    next: last && page.length > query.limit ? encodePlace({ value: last[column], rank: last.rank }) : null,
  }
}

/** The chart's points as columns, in order of rank; the trade-off line is always whole. */
export async function listPoints(db: Db, studyId: string): Promise<SchemePoints> {
  const rows = await db.selectFrom('schemes')
    .select(['key', 'number', 'mass_per_area', 'depth', 'on_trade_off_line', sql<number>`coalesce((summary->>'slab')::int, 0)`.as('slab')])
    .where('study_id', '=', studyId)
    .where(({ eb, or }) => or([eb('on_trade_off_line', '=', true), eb('rank', '<=', MOST_POINTS)]))
    .orderBy('rank').execute()
  return {
    key: rows.map(row => row.key),
    number: rows.map(row => row.number),
    massPerArea: rows.map(row => row.mass_per_area),
    depth: rows.map(row => row.depth),
    slab: rows.map(row => row.slab),
    onTradeOffLine: rows.map(row => row.on_trade_off_line),
  }
}

/** Every kept row of a study, ranked: what the engine answers questions from. */
export async function listKeptSchemes(db: Db, studyId: string): Promise<SchemeRow[]> {
  const rows = await db.selectFrom('schemes').select('summary').where('study_id', '=', studyId).orderBy('rank').execute()
  return rows.map(row => row.summary)
}

/** A row of the ranked table by its key. */
export async function findScheme(db: Db, studyId: string, key: string): Promise<SchemeRow | undefined> {
  const row = await db.selectFrom('schemes').select('summary')
    .where('study_id', '=', studyId).where('key', '=', key).executeTakeFirst()
  return row?.summary
}
