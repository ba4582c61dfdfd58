/**
 * Fewest edits that turn one word into another: insert, delete, replace, or swap two neighbours (optimal string alignment).
 *
 * @param limit beyond it the answer is only known to be larger
 * @param replacement cost of replacing one sign by another [1]
 * @returns number of edits [1], Infinity past the limit
 */
export function editDistance(a: string, b: string, limit: number, replacement: (from: string, to: string) => number = () => 1): number {
  if (Math.abs(a.length - b.length) > limit) return Infinity
  let [before, row] = [[] as number[], Array.from({ length: b.length + 1 }, (_, j) => j)]
  for (let i = 1; i <= a.length; i++) {
    const next = [i]
    let least = i
    for (let j = 1; j <= b.length; j++) {
      const [one, other] = [a[i - 1]!, b[j - 1]!]
      let cost = Math.min(row[j]! + 1, next[j - 1]! + 1, row[j - 1]! + (one === other ? 0 : replacement(one, other)))
      if (i > 1 && j > 1 && one === b[j - 2] && a[i - 2] === other) cost = Math.min(cost, before[j - 2]! + 1)
      next.push(cost)
      least = Math.min(least, cost)
    }
    if (least > limit) return Infinity
    before = row
    row = next
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
