import { describe, expect, it } from 'vitest'
import { csv, harmless, latexText, markdown } from '~~/server/services/export/writers'

describe('csv', () => {
  it('quotes what holds commas, quotes and line ends, and ends lines as RFC 4180 says', () => {
    expect(csv(['about'], { headings: ['a', 'b'], rows: [['x, y', 'say "no"'], ['two\nlines', null], [0.1, 1e-7]] }))
      .toBe('# about\r\na,b\r\n"x, y","say ""no"""\r\n"two\nlines",\r\n0.1,1e-7\r\n')
  })

  it.each(['=1+1', '+1', '-1', '@sum', '\tx', '\rx', '\'=x'])('makes %j harmless for a spreadsheet', (text) => {
    expect(harmless(text)).toBe(`'${text}`)
  })

  it('leaves numbers and ordinary words alone', () => {
    expect([harmless(-1), harmless('a=b'), harmless('\'bubble\''), harmless(null)]).toEqual([-1, 'a=b', '\'bubble\'', null])
  })
})

describe('latexText', () => {
  it('escapes every sign that LaTeX would read as its own', () => {
    expect(latexText('50 % & a_b #1 $ {x} ~ ^ \\')).toBe('50 \\% \\& a\\_b \\#1 \\$ \\{x\\} \\textasciitilde{} \\textasciicircum{} \\textbackslash{}')
  })

  it('sets signs and raised digits of units', () => {
    expect(latexText('−4.0(1) K M⁻¹')).toBe('$-$4.0(1) K M$^{-1}$')
  })
})

describe('markdown', () => {
  it('keeps a bar in a name from ending its cell', () => {
    const one = { project: 'p', lab: 'A|B', campaign: 'c', salt: 'NaCl', scale: 'mol/L' as const, revision: 2, readings: [], further: new Map(), fit: null }
    const line = { one, name: 'c', unit: 'K M⁻¹', estimate: -10, standardError: 0.1, lower: null, upper: null, printed: '−10.00(10)', interval: '' }
    expect(markdown(['about'], [line]).split('\n').at(-2)).toBe('| A\\|B | c | NaCl | 2 | c | −10.00(10) | K M⁻¹ |  |')
  })
})
