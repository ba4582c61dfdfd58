const themes = ['light', 'dark'] as const
type Theme = typeof themes[number]
const aYear = 365 * 24 * 60 * 60

/** The theme a person chose, kept in a cookie so that the server draws it from the first byte; unset: the system's. */
export function useTheme() {
  const chosen = useCookie<Theme | undefined>('theme', {
    maxAge: aYear,
    sameSite: 'lax',
    decode: value => themes.find(theme => theme === value),
  })

  function toggle() {
    const current = chosen.value ?? (window.matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light')
    chosen.value = current === 'dark' ? 'light' : 'dark'
  }

  return { chosen: readonly(chosen), toggle }
}
