/** How far a finding holds; the dot before the words says it without colour. */
export const noteTags = {
  'holds': { label: 'Holds', className: 'ok' },
  'holds-as-product': { label: 'Holds as a product', className: 'part' },
  'not-settled': { label: 'Not settled', className: 'open' },
  'no-constants': { label: 'No constants', className: 'bad' },
} as const
export type NoteTag = keyof typeof noteTags

/** A margin note ready to be set: heading and sentences may carry the marks of richPieces.ts. */
export interface MarginNoteText {
  heading: string
  sentences: string[]
  tag?: NoteTag
  /** words in place of the tag's own, where they can say more */
  tagLabel?: string
}
