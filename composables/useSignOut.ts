/** Ends the session on the server and in this browser, then shows the front page. */
export function useSignOut() {
  const { clear } = useUserSession()
  return async () => {
    await $fetch('/api/auth/sign-out', { method: 'POST' })
    await clear()
    clearNuxtData()
    await navigateTo('/')
  }
}
