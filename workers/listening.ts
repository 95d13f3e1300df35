import pg from 'pg'

const AGAIN_AFTER_MS = 500

export interface Listening { stop: () => Promise<void> }

/**
 * Listens on `channels` for good: after a loss it connects again, and tells each channel once without
 * a payload, since words may have been missed.
 */
export function listenFor(url: string, channels: Record<string, (payload: string | undefined) => void>): Listening {
  let client: pg.Client | undefined
  let isStopped = false
  let timer: NodeJS.Timeout | undefined

  const connect = async () => {
    const next = new pg.Client({ connectionString: url, application_name: 'baywright worker feed', keepAlive: true })
    let isLost = false
    const lost = () => {
      if (isLost || isStopped) return
      isLost = true
      timer = setTimeout(() => void connect(), AGAIN_AFTER_MS)
    }
    next.on('error', lost)
    next.on('end', lost)
    next.on('notification', ({ channel, payload }) => channels[channel]?.(payload))
    try {
      await next.connect()
      for (const channel of Object.keys(channels)) await next.query(`listen ${pg.escapeIdentifier(channel)}`)
      client = next
      for (const hear of Object.values(channels)) hear(undefined)
    } catch {
      await next.end().catch(() => {})
      lost()
    }
  }
  void connect()

  return {
    stop: async () => {
      isStopped = true
      clearTimeout(timer)
      await client?.end().catch(() => {})
    },
  }
}
