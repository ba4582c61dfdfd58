import type { TextRecord } from './records'

const isDigits = (cell: string) => /^\s*-?\d+\s*$/.test(cell)
/** 05 is what stands behind a comma, not a number of its own. */
const isWholeNumber = (cell: string) => /^\s*-?(?:0|[1-9]\d*)\s*$/.test(cell)
const isFraction = (cell: string | undefined) => cell !== undefined && /^\d+\s*$/.test(cell)

/** Whether a cell may stand alone, and whether it may be joined to the next. */
function choicesAt(cells: readonly string[], from: number): { alone: boolean, joined: boolean } {
  const cell = cells[from] ?? ''
  const digits = isDigits(cell)
  return { alone: !digits || isWholeNumber(cell), joined: digits && isFraction(cells[from + 1]) }
}

/** In how many ways the cells from one on can become `wanted` cells; two stand for any more, because then it is not clear. */
function waysTo(cells: readonly string[], width: number): (from: number, wanted: number) => number {
  const known = new Map<number, number>()
  const ways = (from: number, wanted: number): number => {
    const left = cells.length - from
    if (left < wanted || left > 2 * wanted) return 0
    if (left === 0) return 1
    const key = from * (width + 1) + wanted
    const before = known.get(key)
    if (before !== undefined) return before
    const { alone, joined } = choicesAt(cells, from)
    const count = Math.min(2, (alone ? ways(from + 1, wanted - 1) : 0) + (joined ? ways(from + 2, wanted - 1) : 0))
    known.set(key, count)
    return count
  }
  return ways
}

/** Joins neighbours of digits so that the cells become `width`; null unless there is exactly one way. */
function joinedTo(cells: readonly string[], width: number): string[] | null {
  const ways = waysTo(cells, width)
  if (ways(0, width) !== 1) return null
  const made: string[] = []
  let from = 0
  while (from < cells.length) {
    const isAlone = choicesAt(cells, from).alone && ways(from + 1, width - made.length - 1) === 1
    made.push(isAlone ? cells[from] ?? '' : `${cells[from]},${cells[from + 1]}`)
    from += isAlone ? 1 : 2
  }
  return made
}

/**
 * Puts numbers together again that a comma cut in two, where commas part the cells and mark the decimals: 0,05,31,2 under two headings.
 * Only rows in which one way leads to the width of the head are changed.
 */
export function joinDecimalCommas(records: TextRecord[]): TextRecord[] {
  const head = records.findIndex(({ cells }) => cells.length > 1 && cells.every(cell => /\D/.test(cell) && !isDigits(cell)))
  const width = records[head]?.cells.length ?? 0
  const below = records.slice(head + 1).filter(({ cells }) => cells.length > 1)
  if (head < 0 || below.filter(({ cells }) => cells.length > width).length < below.length * 0.6) return records
  return records.map((record, index) => {
    const { number, cells } = record
    if (index <= head || cells.length <= width || cells.length > 2 * width) return record
    return { number, cells: joinedTo(cells, width) ?? cells }
  })
}
