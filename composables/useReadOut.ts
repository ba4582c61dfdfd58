interface ReadOutOptions {
  /** how many readings there are, in the order the keys step through */
  count: () => number
  /** the reading nearest to a place in the figure [px] */
  nearest: (x: number, y: number) => number
}

/** Which reading is being read out: by pointer, by arrow keys, put away by Escape or by leaving. */
export function useReadOut({ count, nearest }: ReadOutOptions) {
  const active = ref<number | null>(null)

  function onKey(event: KeyboardEvent) {
    const last = count() - 1
    if (last < 0) return
    const current = active.value
    const next = {
      ArrowRight: current === null ? 0 : Math.min(current + 1, last),
      ArrowLeft: current === null ? last : Math.max(current - 1, 0),
      Home: 0,
      End: last,
      Escape: null,
    }[event.key]
    if (next === undefined) return
    event.preventDefault()
    active.value = next
  }

  function onPointer(event: PointerEvent) {
    if (count() === 0) return
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect()
    active.value = nearest(event.clientX - box.left, event.clientY - box.top)
  }

  function clear() {
    active.value = null
  }

  watch(count, clear)
  return { active: readonly(active), onKey, onPointer, clear }
}
