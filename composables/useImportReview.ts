import type { ChangeImport, Committed, ImportRows, TableImport } from '#shared/contracts/imports'
import { sentenceOf } from './problemOf'

const rowsAtOnce = 200

/** One import on its way: how it reads, its rows, and what a person says about it. Every word is kept by the server at once. */
export function useImportReview(id: string) {
  const request = useRequestFetch()
  const address = `/api/v1/imports/${id}`
  const { data: table, error, refresh } = useAsyncData(`import ${id}`, () => request<TableImport>(address))
  const onlyTelling = ref(false)
  const rows = shallowRef<ImportRows['items']>([])
  const next = ref<number | null>(0)
  const committed = shallowRef<Committed | null>(null)
  const refusal = ref('')
  const isBusy = ref(false)
  const said = ref('')

  const pageOf = (after: number, limit: number) => request<ImportRows>(`${address}/rows`, { query: { after, limit, ...(onlyTelling.value && { look: 'yes' }) } })

  async function showMore() {
    const page = await pageOf(next.value ?? 0, rowsAtOnce)
    rows.value = [...rows.value, ...page.items]
    next.value = page.next
  }

  /** Reads again as many rows as are on the screen. */
  async function showAgain() {
    const wanted = Math.min(500, Math.max(rowsAtOnce, rows.value.length))
    const page = await pageOf(0, wanted)
    rows.value = page.items
    next.value = page.next
  }

  async function attempt(work: () => Promise<void>) {
    refusal.value = ''
    isBusy.value = true
    try {
      await work()
    }
    catch (failure) {
      refusal.value = sentenceOf(failure)
    }
    finally {
      isBusy.value = false
    }
  }

  const change = (body: ChangeImport) => attempt(async () => {
    table.value = await $fetch<TableImport>(address, { method: 'PATCH', body, retry: 0 })
    await showAgain()
    const { ready, toDecide, unreadable, kept } = table.value.rows
    said.value = `${ready} ready, ${toDecide} to decide, ${unreadable} cannot be read, ${kept} kept with the file.`
  })
  const commit = (recipe: string) => attempt(async () => {
    committed.value = await $fetch<Committed>(`${address}/commit`, { method: 'POST', body: recipe.trim() ? { recipe: recipe.trim() } : {}, retry: 0 })
  })
  const discard = () => attempt(async () => {
    await $fetch(`${address}/discard`, { method: 'POST', retry: 0 })
  })

  return { table, error, refresh, rows, next, onlyTelling, committed, refusal, isBusy, said, showMore, showAgain, change, commit, discard }
}
