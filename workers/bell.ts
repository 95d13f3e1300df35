export interface Bell {
  ring: () => void
  /** Resolves at the next ring, or after `ms`; at once where it rang since the last time. */
  next: (ms: number) => Promise<void>
}

/** What one loop waits at; a ring while it is at work is kept. */
export function openBell(): Bell {
  let wake = () => {}
  let hasRung = false
  return {
    ring: () => {
      hasRung = true
      wake()
    },
    next: async (ms) => {
      if (!hasRung) {
        await new Promise<void>((resolve) => {
          const timer = setTimeout(resolve, ms)
          wake = () => {
            clearTimeout(timer)
            resolve()
          }
        })
      }
      hasRung = false
    },
  }
}
