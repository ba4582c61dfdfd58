import type { Decision } from '../types'

/** A person's words on one cell, or on a whole row, the newest ones. */
export interface Words {
  correction?: string
  isAgreed: boolean
  isLeftOut: boolean
  isKeptTwice: boolean
  setAside?: string
}

export interface RowWords {
  row: Words
  cells: ReadonlyMap<number, Words>
}

const silent: Words = { isAgreed: false, isLeftOut: false, isKeptTwice: false }
export const noWords: RowWords = { row: silent, cells: new Map() }

/** A correction starts a cell afresh. One reading or both, and left out or set aside, are choices: the newer word replaces the older. */
function after(words: Words, { action, value }: Decision): Words {
  switch (action) {
    case 'correct': return { ...silent, correction: value ?? '' }
    case 'agree': return { ...words, isAgreed: true, isKeptTwice: false }
    case 'keep-both': return { ...words, isAgreed: false, isKeptTwice: true }
    case 'leave-out': return { ...words, isLeftOut: true, setAside: undefined }
    case 'set-aside': return { ...words, isLeftOut: false, setAside: value?.trim() || 'set aside at the import' }
    case 'reopen': return silent
  }
}

/** Sorts decisions by row; the newest word on a cell holds. Reopening a whole row takes back the words on its cells, too. */
export function wordsByRow(decisions: readonly Decision[]): ReadonlyMap<number, RowWords> {
  const rows = new Map<number, { row: Words, cells: Map<number, Words> }>()
  for (const decision of decisions) {
    const words = rows.get(decision.row) ?? { row: silent, cells: new Map<number, Words>() }
    rows.set(decision.row, words)
    if (decision.column !== null) words.cells.set(decision.column, after(words.cells.get(decision.column) ?? silent, decision))
    else if (decision.action === 'reopen') rows.delete(decision.row)
    else words.row = after(words.row, decision)
  }
  return rows
}
