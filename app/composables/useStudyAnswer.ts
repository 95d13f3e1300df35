import { questionName, type AnswerRecord, type StudyQuestion } from '#shared/schemas/answers'

/** ms between two looks at a question that waits for its answer. */
const LOOK_EVERY_MS = 700
/** The same while the server does not answer. */
const AGAIN_AFTER_MS = 3_000

/** A question that workers answer: what is known of it, and how it is asked. Looks after it until the answer is there. */
export function useStudyAnswer<Result>(studyId: () => string, question: () => StudyQuestion) {
  const record = shallowRef<AnswerRecord<Result> | null>(null)
  const problem = ref<string | null>(null)
  const isAsking = ref(false)
  const name = computed(() => questionName(question()))
  const root = computed(() => `/api/studies/${studyId()}/answers`)
  const isWaiting = computed(() => isAsking.value || record.value?.state === 'queued' || record.value?.state === 'running')
  let timer: ReturnType<typeof setTimeout> | undefined
  let turn = 0

  /** What comes after the page has turned to another question is not shown. */
  async function take(answer: () => Promise<AnswerRecord<Result> | null>) {
    clearTimeout(timer)
    turn += 1
    const own = turn
    try {
      const taken = await answer()
      if (own !== turn) return
      record.value = taken
      problem.value = null
    } catch (error) {
      if (own !== turn) return
      problem.value = apiSentence(error)
    }
    isAsking.value = false
    if (isWaiting.value) timer = setTimeout(look, problem.value === null ? LOOK_EVERY_MS : AGAIN_AFTER_MS)
  }

  async function look() {
    await take(async () => {
      const [known] = await $fetch<AnswerRecord<Result>[]>(root.value, { query: { question: name.value } })
      return known ?? null
    })
  }

  async function ask() {
    if (isWaiting.value) return
    isAsking.value = true
    await take(() => $fetch<AnswerRecord<Result>>(root.value, { method: 'POST', body: question() }))
  }

  watch([root, name], () => {
    record.value = null
    isAsking.value = false
    void look()
  })
  onMounted(look)
  onBeforeUnmount(() => {
    turn += 1
    clearTimeout(timer)
  })
  return { record, problem, isWaiting, ask }
}
