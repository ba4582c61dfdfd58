import { FetchError } from 'ofetch'
import type { Ref } from 'vue'
import type { NewRevision, SeriesState } from '#shared/contracts/revisions'
import type { Problem } from '#shared/contracts/problem'
import type { Series } from '#shared/contracts/series'
import { compareModels, pointsOf, usualOptions } from '#shared/science/fitting'
import { ScienceError } from '#shared/science/errors'
import { sentenceOf } from '~~/composables/problemOf'
import { useKeptDraft } from '~~/composables/useKeptDraft'
import { placedFaults, type Faults } from './changes'
import { editedSeries } from './edited'
import { isBlankDraft, noDraft, restoredDraft, type Draft } from './draft'

const longestUndo = 200
/** The comparison of forms and the diagnostics follow a pause in typing; curve, residuals and constants follow each key. */
const settleAfter = 180

/** What somebody changed, and what somebody else kept meanwhile. */
export interface Conflict { base: Series, theirs: Series }

/** Editing one series: the draft, what it makes of the series, undo, keeping it, and what to do when somebody was quicker. */
export function useSeriesEditing(series: Ref<Series>) {
  const address = `/api/v1/series/${series.value.id}`
  const draft = shallowRef<Draft>(noDraft)
  const past = shallowRef<Draft[]>([])
  const edited = computed(() => editedSeries(series.value, draft.value))
  const settled = useSettled(series, edited)
  const keeping = useKeptDraft(`${address}/draft`)
  const refused = shallowRef<Faults>(new Map())
  const isAsked = ref(false)
  const isBusy = ref(false)
  const refusal = ref('')
  const conflict = shallowRef<Conflict | null>(null)
  const restoredAt = ref<string | null>(null)
  let lastTyped = ''

  /** @param typed the cell that is being typed in: undo takes back its whole text at once */
  function act(next: Draft, typed = '') {
    if (!typed || typed !== lastTyped) past.value = [...past.value.slice(-longestUndo), draft.value]
    lastTyped = typed
    become(next)
  }

  function become(next: Draft) {
    draft.value = next
    refused.value = new Map()
    refusal.value = ''
    if (isBlankDraft(next)) keeping.forget()
    else keeping.keep(series.value.revision, next)
  }

  function undo() {
    const before = past.value.at(-1)
    if (!before) return
    past.value = past.value.slice(0, -1)
    lastTyped = ''
    become(before)
  }

  /** The state that stands from now on; what was typed is in it, or was given up. */
  function settleOn(next: Series) {
    series.value = next
    draft.value = noDraft
    past.value = []
    lastTyped = ''
    isAsked.value = false
    refused.value = new Map()
    conflict.value = null
    restoredAt.value = null
  }

  /** The series as it is now, with what is typed on top: its readings are the same. */
  function replace(next: Series) {
    series.value = next
  }

  async function send(body: NewRevision): Promise<boolean> {
    isBusy.value = true
    refusal.value = ''
    try {
      const kept = await $fetch<Series>(`${address}/revisions`, { method: 'POST', body, retry: 0 }) as Series
      await keeping.forget(true)
      settleOn(kept)
      return true
    }
    catch (error) {
      explain(error)
      return false
    }
    finally {
      isBusy.value = false
    }
  }

  function explain(error: unknown) {
    const problem = error instanceof FetchError ? error.data as Partial<Problem> | undefined : undefined
    if (problem?.status === 409 && problem.current) {
      conflict.value = { base: conflict.value?.base ?? series.value, theirs: problem.current as Series }
      keeping.keep(series.value.revision, draft.value)
      return
    }
    refused.value = placedFaults(problem?.errors ?? [], edited.value.request.rows)
    refusal.value = sentenceOf(error)
  }

  /** Keeps the draft as the next revision; with faults it stays here and the faults show. */
  async function keep(): Promise<boolean> {
    isAsked.value = true
    if (edited.value.faults.size > 0 || !edited.value.hasChanges) return false
    return send(edited.value.request.body)
  }

  async function giveUp() {
    const theirs = conflict.value?.theirs ?? series.value
    await keeping.forget()
    settleOn(theirs)
  }

  /** Takes up the draft of an earlier visit; on an older revision it becomes a conflict to decide. */
  async function restore() {
    const kept = await keeping.restore()
    const content = kept && restoredDraft(kept.content)
    if (!kept || !content || !isBlankDraft(draft.value)) return
    draft.value = content
    restoredAt.value = kept.updatedAt
    if (kept.from === series.value.revision) return
    const theirs = series.value
    const state = kept.from === null ? null : await $fetch<SeriesState>(`${address}/revisions/${kept.from}`) as SeriesState
    const base = withCurrentBlanks(asRevision(theirs, state), theirs)
    series.value = base
    conflict.value = { base, theirs }
  }

  return { series, draft, edited, settled, past, isAsked, isBusy, refused, refusal, conflict, restoredAt, draftState: keeping.state, act, undo, replace, keep, send, giveUp, restore }
}
export type SeriesEditing = ReturnType<typeof useSeriesEditing>

/** A series as one of its revisions held it; null: before there was one. */
export function asRevision(series: Series, state: SeriesState | null): Series {
  if (!state) return { ...series, revision: null, choice: null, readings: [], fit: null }
  return { ...series, revision: state.number, choice: state.choice, readings: state.readings, fit: state.fit }
}

/** Blanks have revisions of their own: a draft on an older revision of the series is about the blanks as they are. */
function withCurrentBlanks(earlier: Series, { readings }: Series): Series {
  const all = [...readings.filter(({ blank }) => blank), ...earlier.readings.filter(({ blank }) => !blank)]
  return { ...earlier, readings: all.map((reading, index) => ({ ...reading, number: index + 1 })) }
}

function supportOf({ readings }: Series): Series['support'] {
  const points = pointsOf(readings)
  try {
    const { verdict, models } = compareModels({ ...usualOptions(points), points })
    return { verdict, models }
  }
  catch (error) {
    if (error instanceof ScienceError) return { verdict: null, models: [] }
    throw error
  }
}

/** The edited series for the parts that take longer to compute: follows a pause in typing. */
function useSettled(series: Ref<Series>, edited: Ref<ReturnType<typeof editedSeries>>): Ref<Series> {
  const settled = shallowRef<Series>(series.value)
  let timer: ReturnType<typeof setTimeout> | undefined
  watch(edited, ({ isChanged, series: next }) => {
    clearTimeout(timer)
    if (isChanged) timer = setTimeout(() => settled.value = { ...next, support: supportOf(next) }, settleAfter)
    else settled.value = next
  })
  onBeforeUnmount(() => clearTimeout(timer))
  return settled
}
