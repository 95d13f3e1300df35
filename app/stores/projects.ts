import type { ProjectDetail, ProjectSummary } from '#shared/schemas/api'

/** The table of projects and the project that is open, with its plates and studies. */
export const useProjectsStore = defineStore('projects', () => {
  const list = ref<ProjectSummary[]>([])
  const current = ref<ProjectDetail | null>(null)

  async function loadList(fetcher: typeof $fetch = $fetch as typeof $fetch) {
    list.value = await fetcher<ProjectSummary[]>('/api/projects')
  }

  /** Opens a project; asks the server only where another one, or none, is open. */
  async function open(id: string, fetcher: typeof $fetch = $fetch as typeof $fetch) {
    if (current.value?.id !== id) await refresh(id, fetcher)
  }

  /** Reads the open project again, after a plate, basis or study of it has changed. */
  async function refresh(id: string | undefined = current.value?.id, fetcher: typeof $fetch = $fetch as typeof $fetch) {
    if (id) current.value = await fetcher<ProjectDetail>(`/api/projects/${id}`)
  }

  async function create(number: string, name: string) {
    return await $fetch<ProjectDetail>('/api/projects', { method: 'POST', body: { number, name } })
  }

  function forget() {
    list.value = []
    current.value = null
  }

  return { list, current, loadList, open, refresh, create, forget }
})
