import { FetchError } from 'ofetch'
import type { Problem } from '#shared/contracts/problem'
import type { FitResult, Point } from '#shared/science/fitting/types'
import type { TableFits } from './tableFits'

/** One sentence about the table as it was sent; index is the reading's place in what was sent. */
export interface Refusal {
  index: number | null
  field: 'x' | 'y' | 'sd' | null
  message: string
}

export type FitState
  = | { kind: 'fitted' }
    | { kind: 'waiting' }
  /** the table cannot be fitted, with every reason */
    | { kind: 'refused', refusals: Refusal[] }
  /** asked too often: goes on by itself at `until` */
    | { kind: 'limited', until: number }
  /** no connection: goes on by itself when it is back */
    | { kind: 'offline' }
  /** the fault is ours */
    | { kind: 'failed', reference: string | null }

const models = { binding: 'linear-langmuir', line: 'linear' } as const
const pause = 250
const usualWait = 20

type Answer = { fit: FitResult } | { refusals: Refusal[] }

function isProblem(data: unknown): data is Problem {
  return typeof data === 'object' && data !== null && 'errors' in data && Array.isArray(data.errors)
}

function refusalsOf(problem: Problem): Refusal[] {
  const all = problem.errors.map(({ path, message }) => ({ ...placeIn(path), message }))
  return all.length > 0 ? all : [{ index: null, field: null, message: problem.detail }]
}

function placeIn(path: string): Pick<Refusal, 'index' | 'field'> {
  const [, index, field] = /points\.(\d+)(?:\.(x|y|sd))?/.exec(path) ?? []
  return { index: index === undefined ? null : Number(index), field: (field ?? null) as Refusal['field'] }
}

async function ask(points: readonly Point[], model: typeof models[keyof typeof models], signal: AbortSignal): Promise<Answer> {
  try {
    return { fit: await $fetch<FitResult>('/api/v1/fit', { method: 'POST', body: { model, points }, signal, retry: 0 }) }
  }
  catch (error) {
    if (error instanceof FetchError && error.status === 400 && isProblem(error.data)) return { refusals: refusalsOf(error.data) }
    throw error
  }
}

function stateOfFailure(error: unknown): FitState {
  const answer = error instanceof FetchError ? error.response : undefined
  if (!answer) return { kind: 'offline' }
  const seconds = Number(answer.headers.get('retry-after') ?? usualWait)
  if (answer.status === 429) return { kind: 'limited', until: Date.now() + 1000 * (Number.isFinite(seconds) ? seconds : usualWait) }
  const data: unknown = answer._data
  return { kind: 'failed', reference: isProblem(data) ? data.reference ?? null : null }
}

/**
 * Fits a table while it is typed: waits for a pause, drops what is out of date, and keeps the last good fit until a
 * newer one is there.
 */
export function useFit(points: () => readonly Point[], initial: TableFits | null) {
  const fits = shallowRef<TableFits | null>(initial)
  const state = shallowRef<FitState>({ kind: initial ? 'fitted' : 'waiting' })
  let running: AbortController | null = null
  let timer: ReturnType<typeof setTimeout> | undefined

  async function run() {
    running?.abort()
    const request = running = new AbortController()
    const sent = points()
    if (sent.length === 0) return settle(null, { kind: 'fitted' })
    state.value = { kind: 'waiting' }
    try {
      const [binding, line] = await Promise.all([models.binding, models.line].map(model => ask(sent, model, request.signal)))
      if (request.signal.aborted || !binding || !line) return
      if ('refusals' in line) return settle(fits.value, { kind: 'refused', refusals: line.refusals })
      settle({ binding: 'fit' in binding ? binding.fit : null, line: line.fit }, { kind: 'fitted' })
    }
    catch (error) {
      if (request.signal.aborted) return
      state.value = stateOfFailure(error)
      if (state.value.kind === 'limited') schedule(state.value.until - Date.now())
    }
  }

  function settle(next: TableFits | null, nextState: FitState) {
    fits.value = next
    state.value = nextState
  }

  function schedule(delay: number) {
    clearTimeout(timer)
    timer = setTimeout(run, delay)
  }

  const retry = () => schedule(0)
  watch(() => JSON.stringify(points()), () => schedule(pause))
  onMounted(() => {
    window.addEventListener('online', retry)
    if (!initial) schedule(0)
  })
  onBeforeUnmount(() => {
    clearTimeout(timer)
    running?.abort()
    window.removeEventListener('online', retry)
  })

  return { fits: shallowReadonly(fits), state: shallowReadonly(state), retry }
}
