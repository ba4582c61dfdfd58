import type { Draft as KeptDraft } from '#shared/contracts/revisions'

const pause = 600
const retryAfter = 10_000

export type DraftState = 'none' | 'keeping' | 'kept' | 'failed'

/** Keeps what is typed on the server while it is typed, and the last of it when the page is left. */
export function useKeptDraft(address: string) {
  const state = ref<DraftState>('none')
  let waiting: { from: number | null, content: unknown } | null = null
  let timer: ReturnType<typeof setTimeout> | undefined
  let running: Promise<unknown> = Promise.resolve()

  const restore = async () => (await $fetch<{ draft: KeptDraft | null }>(address)).draft

  function send(method: 'PUT' | 'DELETE', body?: object) {
    running = running.then(() => $fetch(address, { method, body, retry: 0, keepalive: true })).then(() => true, () => false)
    return running
  }

  async function flush() {
    clearTimeout(timer)
    if (!waiting) return
    const body = waiting
    waiting = null
    state.value = 'keeping'
    const isKept = await send('PUT', body)
    if (waiting) return
    state.value = isKept ? 'kept' : 'failed'
    if (!isKept) keep(body.from, body.content, retryAfter)
  }

  function keep(from: number | null, content: unknown, delay = pause) {
    waiting = { from, content }
    clearTimeout(timer)
    timer = setTimeout(flush, delay)
  }

  /** Forgets what waits; the server forgets too unless it has done so already. */
  async function forget(isGoneAlready = false) {
    waiting = null
    clearTimeout(timer)
    state.value = 'none'
    await running
    if (!isGoneAlready) await send('DELETE')
  }

  const whenHidden = () => document.visibilityState === 'hidden' && flush()
  onMounted(() => document.addEventListener('visibilitychange', whenHidden))
  onBeforeUnmount(() => {
    document.removeEventListener('visibilitychange', whenHidden)
    flush()
  })
  return { state, restore, keep, forget }
}
