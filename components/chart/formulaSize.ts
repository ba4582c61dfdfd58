import { formulaPieces } from '#shared/science/chemistry/ions'

const usualSize = 14
const leastSize = 9
/** Widths of a sign in em: a capital of the text face, a parenthesis, an index at 72 % of the size. */
const em = { capital: 0.67, bracket: 0.35, index: 0.44 } as const

/**
 * Size at which a formula fits a space: the usual one, smaller only for long formulas such as B(C6H5)4^-.
 *
 * @param room [px]
 * @returns size of the letters [px]
 */
export function formulaSize(formula: string, room: number): number {
  const width = formulaPieces(formula)
    .flatMap(({ text, place }) => [...text].map(sign => place ? em.index : /[()]/.test(sign) ? em.bracket : em.capital))
    .reduce((sum, sign) => sum + sign, 0)
  return Math.max(leastSize, Math.min(usualSize, room / width))
}
