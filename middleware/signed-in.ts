/** Visitors who are not signed in go to the front page, which brings them back here afterwards. */
export default defineNuxtRouteMiddleware((to) => {
  const { loggedIn } = useUserSession()
  if (!loggedIn.value) return navigateTo({ path: '/', query: { to: to.fullPath } })
})
