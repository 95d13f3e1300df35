import { closeDb } from '../utils/db'
import { closeFeed } from '../utils/studyFeed'

/** Gives the connections back when the server ends. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('close', async () => {
    await closeFeed()
    await closeDb()
  })
})
