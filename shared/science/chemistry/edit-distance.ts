/** Longer words are never compared. */
const longestWord = 63
/** Three rows of the table, used again for every pair of words: a table of salts compares thousands. */
const rows = [0, 1, 2].map(() => new Float64Array(longestWord + 2))

/**
 * Fewest edits that turn one word into another: insert, delete, replace, or swap two neighbours (optimal string alignment).
 *
 * @param limit beyond it the answer is only known to be larger; the work grows with it, not with the words' product
 * @param replacement cost of replacing one sign by another [1]
 * @returns number of edits [1], Infinity past the limit or for words of more than 63 signs
 */
export function editDistance(a: string, b: string, limit: number, replacement: (from: string, to: string) => number = () => 1): number {
  const band = Math.floor(limit)
  if (Math.abs(a.length - b.length) > band || Math.max(a.length, b.length) > longestWord) return Infinity
  let [before, row, next] = rows as [Float64Array, Float64Array, Float64Array]
  for (let j = 0; j <= b.length + 1; j++) row[j] = j <= band ? j : Infinity
  for (let i = 1; i <= a.length; i++) {
    // Only cells within the band: a path beyond it has more inserts or deletes than the limit.
    const [first, last] = [Math.max(1, i - band), Math.min(b.length, i + band)]
    next[first - 1] = first === 1 && i <= band ? i : Infinity
    next[last + 1] = Infinity
    let least = next[first - 1]!
    for (let j = first; j <= last; j++) {
      const [one, other] = [a[i - 1]!, b[j - 1]!]
      let cost = Math.min(row[j]! + 1, next[j - 1]! + 1, row[j - 1]! + (one === other ? 0 : replacement(one, other)))
      if (i > 1 && j > 1 && one === b[j - 2] && a[i - 2] === other) cost = Math.min(cost, before[j - 2]! + 1)
      next[j] = cost
      least = Math.min(least, cost)
    }
    if (least > limit) return Infinity
    ;[before, row, next] = [row, next, before]
  }
  return row[b.length]! <= limit ? row[b.length]! : Infinity
}

/** The letters a to z of a word as 26 bits. */
export function lettersOf(word: string): number {
  let bits = 0
  for (let i = 0; i < word.length; i++) {
    const letter = word.charCodeAt(i) - 97
    if (letter >= 0 && letter < 26) bits |= 1 << letter
  }
  return bits
}

/** False where the letters alone show that more edits are needed: one edit changes two letters at most. */
export function mayBeWithin(edits: number, letters: number, others: number): boolean {
  let left = letters ^ others
  for (let changes = 0; left !== 0; changes++) {
    if (changes >= 2 * edits) return false
    left &= left - 1
  }
  return true
}
