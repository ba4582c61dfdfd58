/** A small menu that opens from a button and closes on Escape, on a press elsewhere and when the focus leaves it. */
export function useDisclosure(root: Readonly<Ref<HTMLElement | null>>) {
  const isOpen = ref(false)
  const close = () => {
    isOpen.value = false
  }
  const toggle = () => {
    isOpen.value = !isOpen.value
  }

  function onKey(event: KeyboardEvent) {
    if (event.key !== 'Escape' || !isOpen.value) return
    close()
    root.value?.querySelector('button')?.focus()
  }
  function onFocusOut(event: FocusEvent) {
    if (event.relatedTarget instanceof Node && !root.value?.contains(event.relatedTarget)) close()
  }
  function onPress(event: PointerEvent) {
    if (event.target instanceof Node && !root.value?.contains(event.target)) close()
  }

  onMounted(() => document.addEventListener('pointerdown', onPress))
  onBeforeUnmount(() => document.removeEventListener('pointerdown', onPress))
  return { isOpen, toggle, close, onKey, onFocusOut }
}
