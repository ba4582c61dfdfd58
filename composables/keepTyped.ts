import type { ObjectDirective } from 'vue'

/** What somebody typed before the page came alive stays: without this the model's empty text would be put over it. */
export const vKeepTyped: ObjectDirective<HTMLInputElement, (text: string) => void> = {
  created(input, { value: take }) {
    if (input.value) take(input.value)
  },
}
