interface Toast {
  id: number
  message: string
  action?: { label: string, run: () => void }
}

/** How long a toast stands, ms. */
const LIFE_MS = 6000

const toasts = ref<Toast[]>([])
const timers = new Map<number, ReturnType<typeof setTimeout>>()
let lastId = 0

function dismiss(id: number) {
  clearTimeout(timers.get(id))
  timers.delete(id)
  toasts.value = toasts.value.filter(toast => toast.id !== id)
}

function release(id: number) {
  clearTimeout(timers.get(id))
  timers.set(id, setTimeout(() => dismiss(id), LIFE_MS))
}

function hold(id: number) {
  clearTimeout(timers.get(id))
}

/** Never the sole carrier of an error: for another person's change and for an undo. Browser only. */
export function useToasts() {
  function tell(message: string, action?: Toast['action']) {
    if (import.meta.server) return
    lastId += 1
    toasts.value = [...toasts.value, { id: lastId, message, action }]
    release(lastId)
  }
  return { toasts: readonly(toasts), tell, hold, release, dismiss }
}
