import { useRegleSchema } from '@regle/schemas'
import { FetchError } from 'ofetch'
import type { z } from 'zod'
import type { Problem } from '#shared/contracts/problem'
import { sentenceOf } from './problemOf'

type Texts = Record<string, string>
export type FormContract = z.ZodType<Record<string, unknown>, Record<string, unknown>>

interface TypedForm {
  /** of the storage in which what is typed survives a reload */
  key: string
  /** the texts as they stand before anything is typed */
  standing: () => Texts
  contract: FormContract
  /** what the contract is to check */
  values: (texts: Texts) => Record<string, unknown>
}

const prefix = 'anionary form '

/** A form that is checked by the contract of its route, field by field as fields are left, and that survives a reload. */
export function useTypedForm({ key, standing, contract, values }: TypedForm) {
  const texts = ref<Texts>(standing())
  const state = ref<Record<string, unknown>>(values(texts.value))
  const { r$ } = useRegleSchema(state, contract)
  const left = ref(new Set<string>())
  const refused = ref<Record<string, string>>({})
  const general = ref('')
  const isBusy = ref(false)
  const isRestored = ref(false)
  const isTyped = computed(() => JSON.stringify(texts.value) !== JSON.stringify(standing()))

  watch(texts, (now) => {
    state.value = values(now)
    refused.value = {}
    if (isTyped.value) localStorage.setItem(prefix + key, JSON.stringify(now))
    else localStorage.removeItem(prefix + key)
  }, { deep: true })

  onMounted(() => {
    const kept = localStorage.getItem(prefix + key)
    if (!kept) return
    const before = JSON.parse(kept) as Texts
    texts.value = { ...texts.value, ...Object.fromEntries(Object.entries(before).filter(([name]) => name in texts.value)) }
    isRestored.value = isTyped.value
  })

  const faultsOf = (name: string): readonly string[] => {
    const field = r$.$fields[name] as { $silentErrors?: readonly string[] } | undefined
    return field?.$silentErrors ?? []
  }
  /** What is wrong with a field, once it was left. */
  const problemOf = (name: string): string | undefined => refused.value[name] ?? (left.value.has(name) ? faultsOf(name)[0] : undefined)

  function leave(name: string) {
    left.value = new Set(left.value).add(name)
  }

  function startOver() {
    texts.value = standing()
    left.value = new Set()
    isRestored.value = false
    general.value = ''
  }

  /** Sends what the contract accepts; null where something has to change first, which then stands at its field. */
  async function send<Answer>(address: string, method: 'POST' | 'PUT', more: Record<string, unknown> = {}): Promise<Answer | null> {
    left.value = new Set(Object.keys(texts.value))
    general.value = ''
    const { valid } = await r$.$validate()
    if (!valid) return null
    isBusy.value = true
    try {
      const answer = await $fetch<Answer>(address, { method, body: { ...state.value, ...more }, retry: 0 }) as Answer
      localStorage.removeItem(prefix + key)
      isRestored.value = false
      return answer
    }
    catch (error) {
      const { errors = [] } = (error instanceof FetchError ? error.data as Partial<Problem> | undefined : undefined) ?? {}
      refused.value = Object.fromEntries(errors.map(({ path, message }) => [path, message]))
      general.value = sentenceOf(error)
      return null
    }
    finally {
      isBusy.value = false
    }
  }

  return { texts, isTyped, isRestored, isBusy, general, refused, problemOf, leave, startOver, send }
}
