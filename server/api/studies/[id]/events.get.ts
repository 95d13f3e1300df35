import type { StudyProgress } from '#shared/schemas/api'
import { findProgress } from '../../../database/queries/studies'

const BEAT_MS = 15_000
const FINAL = new Set<StudyProgress['state']>(['finished', 'cancelled', 'failed'])

/**
 * Server-sent events: `progress` with a StudyProgress at once and whenever it moves, `beat` each 15 s.
 * After a final state the stream ends.
 */
export default apiHandler(async (event) => {
  const { studyId } = await requireStudy(event, 'project.read')
  const stream = createEventStream(event)
  let hasSpoken = false
  const push = (progress: StudyProgress) => {
    hasSpoken = true
    const told = stream.push({ event: 'progress', data: JSON.stringify(progress) })
    if (FINAL.has(progress.state)) void told.then(() => stream.close())
  }
  const stopWatching = watchStudy(studyId, push)
  const beat = setInterval(() => void stream.push({ event: 'beat', data: '{}' }), BEAT_MS)
  stream.onClosed(() => {
    clearInterval(beat)
    stopWatching()
  })
  const snapshot = await findProgress(useDb(), studyId)
  // What was heard meanwhile is newer than the snapshot.
  if (snapshot && !hasSpoken) push(snapshot)
  await stream.send()
})
