import type { NuxtError } from '#app'

/**
 * What a page does when its request is refused: without a session it goes to the front page, which brings the visitor
 * back; a place that does not exist, or is none of theirs, is said to be missing. Any other failure is left to the page.
 */
export async function useRefusal(error: Ref<NuxtError<unknown> | null | undefined>, missing: string) {
  const status = error.value?.statusCode
  if (status === 401) {
    await navigateTo({ path: '/', query: { to: useRoute().fullPath } })
  }
  else if (status === 404 || status === 403 || status === 400) {
    throw createError({ statusCode: 404, statusMessage: 'Not found', message: missing, fatal: true })
  }
}
