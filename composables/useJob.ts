import type { Job } from '#shared/contracts/jobs'
import { sentenceOf } from './problemOf'

const ended = ['done', 'failed', 'cancelled'] as const
const isEnded = ({ state }: Job) => ended.some(end => end === state)

/** Follows long work as the server tells of it, over lost connections too; says how long it may still take. */
export function useJob(onEnd: (job: Job) => void) {
  const job = shallowRef<Job | null>(null)
  const problem = ref('')
  const since = ref(0)
  const now = ref(0)
  let stream: EventSource | null = null

  function follow(started: Job) {
    stop()
    job.value = started
    since.value = now.value = Date.now()
    stream = new EventSource(`/api/v1/jobs/${started.id}/events`)
    stream.addEventListener('job', (event: MessageEvent<string>) => take(JSON.parse(event.data) as Job))
  }

  function take(next: Job) {
    job.value = next
    now.value = Date.now()
    if (!isEnded(next)) return
    stop()
    onEnd(next)
  }

  function stop() {
    stream?.close()
    stream = null
  }

  /** Asks the work to stop; what it drew so far is not kept. */
  async function cancel() {
    if (!job.value) return
    try {
      await $fetch(`/api/v1/jobs/${job.value.id}/cancel`, { method: 'POST', retry: 0 })
    }
    catch (error) {
      problem.value = sentenceOf(error)
    }
  }

  const isRunning = computed(() => job.value !== null && !isEnded(job.value))
  /** Seconds left at the pace so far; null while nothing is known. */
  const secondsLeft = computed(() => {
    const { done, total } = job.value ?? { done: 0, total: null }
    const passed = (now.value - since.value) / 1000
    return total === null || done === 0 || passed <= 0 ? null : Math.ceil((total - done) * passed / done)
  })

  onBeforeUnmount(stop)
  return { job, problem, isRunning, secondsLeft, follow, cancel }
}
