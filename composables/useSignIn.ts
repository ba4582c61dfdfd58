import { FetchError } from 'ofetch'
import type { Problem } from '#shared/contracts/problem'
import { returnAddress } from './returnAddress'

const usualWait = 30

/** Signing in: what is wrong beside which field, and how long to wait after too many misses. */
export function useSignIn() {
  const route = useRoute()
  const session = useUserSession()
  const problems = ref<{ email?: string, password?: string }>({})
  const general = ref('')
  const isBusy = ref(false)
  const waitSeconds = ref(0)
  let clock: ReturnType<typeof setInterval> | undefined

  function wait(seconds: number) {
    clearInterval(clock)
    waitSeconds.value = seconds
    clock = setInterval(() => {
      waitSeconds.value -= 1
      if (waitSeconds.value <= 0) clearInterval(clock)
    }, 1000)
  }

  function explain(error: unknown) {
    const answer = error instanceof FetchError ? error.response : undefined
    if (!answer) {
      general.value = 'No connection to the server. What you typed is still here: try again when you are online.'
      return
    }
    const problem = answer._data as Problem | undefined
    for (const { path, message } of problem?.errors ?? []) {
      if (path === 'email' || path === 'password') problems.value[path] = message
    }
    if (answer.status === 429) wait(Number(answer.headers.get('retry-after')) || usualWait)
    const isSaid = Object.keys(problems.value).length > 0
    if (!isSaid) general.value = problem?.detail ?? 'Signing in did not work, and the fault is ours. Try again in a moment.'
  }

  async function signIn(email: string, password: string) {
    problems.value = {}
    general.value = ''
    isBusy.value = true
    try {
      await $fetch('/api/auth/sign-in', { method: 'POST', body: { email: email.trim(), password }, retry: 0 })
      await session.fetch()
      await navigateTo(returnAddress(route.query.to))
    }
    catch (error) {
      explain(error)
    }
    finally {
      isBusy.value = false
    }
  }

  onBeforeUnmount(() => clearInterval(clock))
  return { problems, general, isBusy, waitSeconds, signIn }
}
