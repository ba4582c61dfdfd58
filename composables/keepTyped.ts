import type { ObjectDirective } from 'vue'

/** What somebody typed before the page came alive stays: without this the text of the model would be put over it. */
export const vKeepTyped: ObjectDirective<HTMLInputElement | HTMLTextAreaElement, (text: string) => void> = {
  created(input, { value: take }) {
    if (input.value !== input.defaultValue) take(input.value)
  },
}
