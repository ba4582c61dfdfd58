/** Calls back after the theme in force changed, by the switch or by the system. */
export function useThemeChange(onChange: () => void) {
  let stop = () => {}
  onMounted(() => {
    const observer = new MutationObserver(onChange)
    observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] })
    const system = window.matchMedia('(prefers-color-scheme: dark)')
    system.addEventListener('change', onChange)
    stop = () => {
      observer.disconnect()
      system.removeEventListener('change', onChange)
    }
  })
  onBeforeUnmount(() => stop())
}
