import { describe, expect, it } from 'vitest'
import { richPieces } from '~~/components/ui/richPieces'

describe('richPieces', () => {
  it('cuts a sentence into runs in reading order', () => {
    expect(richPieces('*B*~max~ is 4 M^−1^.')).toEqual([
      { text: 'B', level: 'italic' },
      { text: 'max', level: 'sub' },
      { text: ' is 4 M', level: 'plain' },
      { text: '−1', level: 'sup' },
      { text: '.', level: 'plain' },
    ])
  })

  it('leaves a mark without its partner as it is written', () => {
    expect(richPieces('5 * 3')).toEqual([{ text: '5 * 3', level: 'plain' }])
  })

  it('gives nothing for nothing', () => {
    expect(richPieces('')).toEqual([])
  })
})
