import { markOf } from '~~/components/chart/ionMarks'
import type { Palette } from './types'

/** Reads the colours in force at an element, so that a figure follows the theme and a downloaded one keeps its colours. */
export function readPalette(element: Element, ion: string | null): Palette {
  const style = getComputedStyle(element)
  const token = (name: string) => style.getPropertyValue(name).trim()
  return {
    paper: token('--paper'), ink: token('--ink'), ink2: token('--ink-2'), rule: token('--rule'), hair: token('--hair'),
    error: token('--error'), haze: token('--haze'),
    hazeOpacity: Number(token('--haze-a')), bandOpacity: Number(token('--band-in')),
    front: token(markOf(ion ?? '').variable),
  }
}
