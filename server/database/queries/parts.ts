/**
 * A study is cut into parts of equal size, numbered from 0. Each part is handed in once; handing it in
 * again changes nothing. Whoever hands in the last one sends the job that ranks the study.
 */
import { sql } from 'kysely'
import type { SchemeRow, StudyProgress } from '#shared/schemas/api'
import type { StudyCounts } from '#shared/schemas/study'
import type { Db } from '../client'
import { PROGRESS_CHANNEL, notify, sendJobs, type StudyJob } from '../queue'

/** ms between two words to those who watch: five a second, whatever the number of workers. */
const TELL_EVERY_MS = 200
/** Points of the curve of the lightest found. */
const HISTORY_POINTS = 200
/** Relative difference of masses that is rounding: sums in another order. */
const EQUAL_WITHIN = 1e-9
/** So many parts that nobody has merged are merged into one. */
export const PARTS_TO_MERGE = 16

export interface StudyStart { total: number, partSize: number | null, partsTotal: number | null }

/** Marks a waiting study as running; undefined where it has ended or is missing. */
export async function beginStudy(db: Db, id: string): Promise<StudyStart | undefined> {
  const begun = await db.updateTable('studies').set({
    state: 'running',
    started_at: sql`coalesce(started_at, now())`,
    progress: sql`progress || '{"state":"running"}'::jsonb`,
  }).where('id', '=', id).where('state', 'in', ['queued', 'running'])
    .returning(['total', 'part_size as partSize', 'parts_total as partsTotal']).executeTakeFirst()
  if (begun) await notify(db, PROGRESS_CHANNEL, id)
  return begun
}

/** How a running study is cut; undefined where it is not running. */
export async function findCut(db: Db, id: string): Promise<{ total: number, partSize: number } | undefined> {
  const row = await db.selectFrom('studies').select(['total', 'part_size'])
    .where('id', '=', id).where('state', '=', 'running').executeTakeFirst()
  return row?.part_size ? { total: row.total, partSize: row.part_size } : undefined
}

/**
 * In the caller's transaction: cuts a running study and sends a job for each part but those that the
 * caller hands in itself. A second call changes nothing.
 */
export async function cutStudy(trx: Db, id: string, partSize: number, handedIn: readonly number[] = []): Promise<void> {
  const cut = await trx.updateTable('studies')
    .set({ part_size: partSize, parts_total: sql`greatest(1, ceil(total::numeric / ${partSize}))::int` })
    .where('id', '=', id).where('state', '=', 'running').where('parts_total', 'is', null)
    .returning('parts_total').executeTakeFirst()
  const jobs: StudyJob[] = []
  for (let number = 0; number < (cut?.parts_total ?? 0); number++) {
    if (!handedIn.includes(number)) jobs.push({ kind: 'part', studyId: id, number })
  }
  if (jobs.length > 0) await sendJobs(trx, jobs)
}

export interface PartDone {
  number: number
  counts: StudyCounts
  /** Lightest scheme of the part. */
  best: SchemeRow | null
  /** What the engine hands on, as JSON. */
  result: string
}

/** In the caller's transaction: takes in a part, moves the progress on, and sends the ranking after the last one. */
export async function savePart(trx: Db, studyId: string, part: PartDone): Promise<'saved' | 'known' | 'ended'> {
  const study = await trx.selectFrom('studies')
    .select(['progress', 'parts_total', 'parts_done', 'total', 'started_at', 'told_at', sql<Date>`clock_timestamp()`.as('now')])
    .where('id', '=', studyId).where('state', '=', 'running').forUpdate().executeTakeFirst()
  if (!study) return 'ended'
  const added = await trx.insertInto('study_parts')
    .values({ study_id: studyId, number: part.number, result: part.result })
    .onConflict(conflict => conflict.doNothing()).returning('number').executeTakeFirst()
  if (!added) return 'known'
  const elapsed = study.now.getTime() - (study.started_at ?? study.now).getTime()
  const isLast = study.parts_done + 1 === study.parts_total
  const tells = isLast || study.told_at === null || study.now.getTime() - study.told_at.getTime() >= TELL_EVERY_MS
  await trx.updateTable('studies').set({
    parts_done: study.parts_done + 1,
    progress: JSON.stringify(moveOn(study.progress, part, elapsed)),
    ...(tells ? { told_at: study.now } : {}),
  }).where('id', '=', studyId).execute()
  if (tells) await notify(trx, PROGRESS_CHANNEL, studyId)
  if (isLast) await sendJobs(trx, [{ kind: 'finish', studyId }])
  return 'saved'
}

/** Sum of two counts of one range. */
function addCounts(a: StudyCounts, b: StudyCounts): StudyCounts {
  const rejected = { ...a.rejected }
  for (const [reason, count] of Object.entries(b.rejected) as [keyof typeof rejected, number][]) {
    rejected[reason] = (rejected[reason] ?? 0) + count
  }
  return {
    range: a.range, examined: a.examined + b.examined, cut: a.cut + b.cut, rejected, feasible: a.feasible + b.feasible,
  }
}

function moveOn(progress: StudyProgress, part: PartDone, elapsedMs: number): StudyProgress {
  const counts = addCounts(progress.counts, part.counts)
  const done = counts.examined + counts.cut
  const { best, history } = progress
  const found = part.best
  const isLighter = found !== null && (best === null || found.massPerArea < best.massPerArea * (1 - EQUAL_WITHIN))
  return {
    ...progress,
    counts,
    examined: counts.examined,
    secondsLeft: done > 0 ? elapsedMs / 1000 / done * (progress.total - done) : null,
    best: isLighter
      ? { number: found.number, massPerArea: found.massPerArea, depth: found.depth, baysX: found.baysX, baysY: found.baysY }
      : best,
    history: isLighter ? thinned([...history, { examined: counts.examined, massPerArea: found.massPerArea }]) : history,
  }
}

/** Every second point goes where there are too many; the first and the last stay. */
function thinned<T>(points: T[]): T[] {
  if (points.length <= HISTORY_POINTS) return points
  return points.filter((_, i) => i % 2 === 0 || i === points.length - 1)
}

/** Merges of parts; `merge` is the engine's, on JSON texts read one at a time. */
export type Merge = (parts: AsyncIterable<string>) => Promise<string>

async function* readParts(db: Db, studyId: string, numbers: readonly number[]): AsyncGenerator<string> {
  for (const number of numbers) {
    const row = await db.selectFrom('study_parts').select('result')
      .where('study_id', '=', studyId).where('number', '=', number).executeTakeFirstOrThrow()
    if (row.result !== null) yield row.result
  }
}

/** Numbers of the parts whose result stands by itself, rising. */
async function unmergedParts(db: Db, studyId: string): Promise<number[]> {
  const rows = await db.selectFrom('study_parts').select('number')
    .where('study_id', '=', studyId).where('result', 'is not', null).orderBy('number')
    .forUpdate().skipLocked().execute()
  return rows.map(row => row.number)
}

/** Keeps what is stored small: where enough parts stand by themselves, they become one. */
export async function mergeParts(db: Db, studyId: string, merge: Merge): Promise<void> {
  const waiting = await db.selectFrom('study_parts').select(({ fn }) => fn.countAll<string>().as('count'))
    .where('study_id', '=', studyId).where('result', 'is not', null).executeTakeFirstOrThrow()
  if (Number(waiting.count) < PARTS_TO_MERGE) return
  await db.transaction().execute(async (trx) => {
    const [first, ...others] = await unmergedParts(trx, studyId)
    if (first === undefined || others.length + 1 < PARTS_TO_MERGE) return
    const result = await merge(readParts(trx, studyId, [first, ...others]))
    await trx.updateTable('study_parts').set({ result: null })
      .where('study_id', '=', studyId).where('number', 'in', others).execute()
    await trx.updateTable('study_parts').set({ result })
      .where('study_id', '=', studyId).where('number', '=', first).execute()
  })
}

/** The merged parts of a study all of whose parts are in; undefined where it has ended or is not that far. */
export async function collectParts(trx: Db, studyId: string, merge: Merge): Promise<{ result: string, total: number } | undefined> {
  const study = await trx.selectFrom('studies').select(['parts_total', 'parts_done', 'total'])
    .where('id', '=', studyId).where('state', '=', 'running').forUpdate().executeTakeFirst()
  if (!study || study.parts_total === null || study.parts_done < study.parts_total) return undefined
  const numbers = await trx.selectFrom('study_parts').select('number')
    .where('study_id', '=', studyId).where('result', 'is not', null).orderBy('number').forUpdate().execute()
  const result = await merge(readParts(trx, studyId, numbers.map(row => row.number)))
  return { result, total: study.total }
}
