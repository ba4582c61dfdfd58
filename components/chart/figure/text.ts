import type { Box } from './types'

/** Mean advance of a letter in the sans face, as a part of the type size; measured on the words that figures use. */
const advance = 0.48

/** About how wide a line of text is [px]; used to part the stipple and to keep words apart, never to cut text. */
export function textWidth(text: string, size: number): number {
  return text.length * size * advance
}

/** The box of a line of text; y is its middle. */
export function textBox(text: string, x: number, y: number, size: number, align: 'left' | 'center' | 'right'): Box {
  const width = textWidth(text, size)
  const left = align === 'left' ? x : align === 'right' ? x - width : x - width / 2
  return { left, top: y - size * 0.6, right: left + width, bottom: y + size * 0.6 }
}

export function overlap(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom
}
