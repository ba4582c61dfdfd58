import { describe, expect, it } from 'vitest'
import { formulaPieces } from '~~/components/ui/formulaPieces'

describe('formulaPieces', () => {
  it('sets the subscript before the charge', () => {
    expect(formulaPieces('SO4^2-')).toEqual([
      { text: 'SO', level: 'base' }, { text: '4', level: 'sub' }, { text: '2−', level: 'sup' },
    ])
  })

  it('lowers every number inside a salt', () => {
    expect(formulaPieces('NaH2PO4').map(piece => piece.level)).toEqual(['base', 'sub', 'base', 'sub'])
  })

  it('keeps a leading number on the line', () => {
    expect(formulaPieces('2H2O')[0]).toEqual({ text: '2', level: 'base' })
  })

  it('leaves a plain word whole', () => {
    expect(formulaPieces('Na')).toEqual([{ text: 'Na', level: 'base' }])
  })
})
