import type { ServerResponse } from 'node:http'

/**
 * Ends the process without delay. Open event streams would hold the server up, so they are ended at the signal;
 * and when the starter is killed outright, its channel closes and this process ends too.
 */
export default defineNitroPlugin((nitro) => {
  const open = new Set<ServerResponse>()
  nitro.hooks.hook('request', (event) => {
    const { res } = event.node
    open.add(res)
    res.once('close', () => open.delete(res))
  })
  const endStreams = () => {
    for (const response of open) {
      if (String(response.getHeader('content-type')).startsWith('text/event-stream')) response.end()
    }
  }
  process.once('SIGTERM', endStreams)
  process.once('SIGINT', endStreams)
  process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'))
})
