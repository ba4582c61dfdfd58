const isDigits = (cell: string) => /^\s*-?\d+\s*$/.test(cell)
/** 05 is what stands behind a comma, not a number of its own. */
const isWholeNumber = (cell: string) => /^\s*-?(?:0|[1-9]\d*)\s*$/.test(cell)

/** All ways to join neighbours of digits so that the cells become `width`; two are enough to know that it is not clear. */
function joinings(cells: readonly string[], width: number): string[][] {
  const found: string[][] = []
  const go = (from: number, made: string[]) => {
    const [left, wanted] = [cells.length - from, width - made.length]
    if (found.length > 1 || left < wanted || left > 2 * wanted) return
    if (left === 0) {
      found.push(made)
      return
    }
    const [cell = '', next = ''] = [cells[from], cells[from + 1]]
    if (!isDigits(cell) || isWholeNumber(cell)) go(from + 1, [...made, cell])
    if (isDigits(cell) && /^\d+\s*$/.test(next)) go(from + 2, [...made, `${cell},${next}`])
  }
  go(0, [])
  return found
}

/**
 * Puts numbers together again that a comma cut in two, where commas part the cells and mark the decimals: 0,05,31,2 under two headings.
 * Only rows in which one way leads to the width of the head are changed.
 */
export function joinDecimalCommas(records: string[][]): string[][] {
  const head = records.findIndex(cells => cells.length > 1 && cells.every(cell => /\D/.test(cell) && !isDigits(cell)))
  const width = records[head]?.length ?? 0
  const below = records.slice(head + 1).filter(cells => cells.length > 1)
  if (head < 0 || below.filter(cells => cells.length > width).length < below.length * 0.6) return records
  return records.map((cells, index) => {
    if (index <= head || cells.length <= width) return cells
    const [first, ...others] = joinings(cells, width)
    return first && others.length === 0 ? first : cells
  })
}
