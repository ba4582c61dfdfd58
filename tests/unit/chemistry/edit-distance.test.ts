import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { editDistance, lettersOf, mayBeWithin } from '#shared/science/chemistry/edit-distance'

/** The same definition without band and limit, by recursion. */
function slowDistance(a: string, b: string): number {
  if (a === '' || b === '') return a.length + b.length
  const [one, other] = [a.at(-1), b.at(-1)]
  const plain = Math.min(slowDistance(a.slice(0, -1), b) + 1, slowDistance(a, b.slice(0, -1)) + 1, slowDistance(a.slice(0, -1), b.slice(0, -1)) + (one === other ? 0 : 1))
  const isSwap = a.length > 1 && b.length > 1 && one === b.at(-2) && a.at(-2) === other
  return isSwap ? Math.min(plain, slowDistance(a.slice(0, -2), b.slice(0, -2)) + 1) : plain
}

const word = fc.string({ unit: fc.constantFrom('a', 'b', 'c'), maxLength: 6 })

describe('editDistance', () => {
  it.each([['nascn', 'nasnc', 1], ['sulfate', 'sufate', 1], ['nacl', 'nabr', 2], ['', 'a', 1], ['same', 'same', 0]])('from %s to %s is %i', (a, b, edits) => {
    expect(editDistance(a, b, 2)).toBe(edits)
  })

  it('says only that a word is too far past the limit', () => {
    expect(editDistance('sodium', 'lithium', 2)).toBe(Infinity)
    expect(editDistance('a'.repeat(100), 'a'.repeat(100), 2)).toBe(Infinity)
  })

  it('agrees with the definition up to its limit', () => {
    fc.assert(fc.property(word, word, fc.constantFrom(0, 1, 2, 3), (a, b, limit) => {
      const edits = slowDistance(a, b)
      expect(editDistance(a, b, limit)).toBe(edits <= limit ? edits : Infinity)
    }), { seed: 5, numRuns: 400 })
  })

  it('takes half steps where a replacement costs half', () => {
    expect(editDistance('naci', 'nacl', 1, () => 0.5)).toBe(0.5)
  })
})

describe('mayBeWithin', () => {
  it('never leaves out a word that is near enough', () => {
    fc.assert(fc.property(word, word, (a, b) => mayBeWithin(slowDistance(a, b), lettersOf(a), lettersOf(b))), { seed: 6, numRuns: 400 })
  })
})
