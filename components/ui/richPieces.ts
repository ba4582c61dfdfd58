/** A run of text in one setting: quantities italic, indices down, exponents up. */
export interface RichPiece {
  text: string
  level: 'plain' | 'italic' | 'sub' | 'sup' | 'strong'
}

const marks = { '*': 'italic', '~': 'sub', '^': 'sup', '#': 'strong' } as const
const marked = /\*([^*]+)\*|~([^~]+)~|\^([^^]+)\^|#([^#]+)#/g

/**
 * Cuts a sentence with light marks into runs: *K* italic, ~max~ below the line, ^−1^ above it, #Row 10# strong.
 * Marks do not nest; a mark without its partner stays as it is written.
 */
export function richPieces(sentence: string): RichPiece[] {
  const pieces: RichPiece[] = []
  let end = 0
  for (const match of sentence.matchAll(marked)) {
    if (match.index > end) pieces.push({ text: sentence.slice(end, match.index), level: 'plain' })
    const mark = match[0].charAt(0) as keyof typeof marks
    pieces.push({ text: match[0].slice(1, -1), level: marks[mark] })
    end = match.index + match[0].length
  }
  if (end < sentence.length) pieces.push({ text: sentence.slice(end), level: 'plain' })
  return pieces
}
