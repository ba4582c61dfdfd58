/** The size of an element as it is laid out [px]; null until it is on the page. */
export function useElementSize(element: Readonly<Ref<HTMLElement | null>>) {
  const size = shallowRef<{ width: number, height: number } | null>(null)
  let observer: ResizeObserver | null = null

  function measure() {
    const { clientWidth: width = 0, clientHeight: height = 0 } = element.value ?? {}
    if (width > 0 && height > 0) size.value = { width, height }
  }

  onMounted(() => {
    if (!element.value) return
    measure()
    observer = new ResizeObserver(measure)
    observer.observe(element.value)
  })
  onBeforeUnmount(() => observer?.disconnect())
  return readonly(size)
}
