import { FetchError } from 'ofetch'
import type { Problem } from '#shared/contracts/problem'
import { sentenceOf } from './problemOf'

/** Sending a form: what is wrong beside which field, the rest in one sentence. What is typed stays. */
export function useSending() {
  const problems = ref<Record<string, string>>({})
  const general = ref('')
  const isBusy = ref(false)

  async function send<Answer>(address: string, body: object): Promise<Answer | null> {
    problems.value = {}
    general.value = ''
    isBusy.value = true
    try {
      return await $fetch<Answer>(address, { method: 'POST', body, retry: 0 }) as Answer
    }
    catch (error) {
      const { errors = [] } = (error instanceof FetchError ? error.data as Partial<Problem> | undefined : undefined) ?? {}
      problems.value = Object.fromEntries(errors.map(({ path, message }) => [path, message]))
      general.value = sentenceOf(error)
      return null
    }
    finally {
      isBusy.value = false
    }
  }

  return { problems, general, isBusy, send }
}
