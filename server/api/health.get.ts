import { sql } from 'kysely'

/** Whether this web server and its database answer; the launcher and the tests wait for it. 503 when they do not. */
export default defineEventHandler(async (event) => {
  try {
    await sql`select 1`.execute(useDb())
    return { status: 'ok' }
  } catch {
    setResponseStatus(event, 503)
    return { status: 'no-database' }
  }
})
