import { emptyRow, type SheetRow } from './check'

/** Invented example tables; the page says that they are invented. */
export interface Example {
  name: 'thiocyanate' | 'sulfate' | 'too few'
  ion: string
  rows: readonly (readonly [x: string, y: string])[]
}

export const examples: readonly [Example, ...Example[]] = [
  {
    name: 'thiocyanate',
    ion: 'SCN^-',
    rows: [
      ['0.00', '31.00'], ['0.02', '31.27'], ['0.05', '31.56'], ['0.12', '31.91'], ['0.20', '32.09'], ['0.30', '32.07'],
      ['0.40', '31.86'], ['0.60', '31.47'], ['0.70', '31.15'], ['0.80', '30.81'], ['1.00', '30.17'],
    ],
  },
  {
    name: 'sulfate',
    ion: 'SO4^2-',
    rows: [
      ['0.00', '31.02'], ['0.03', '30.07'], ['0.06', '29.21'], ['0.10', '27.99'], ['0.14', '26.79'], ['0.18', '25.55'],
      ['0.22', '24.41'], ['0.26', '23.16'], ['0.30', '21.97'], ['0.36', '20.12'],
    ],
  },
  {
    name: 'too few',
    ion: 'I^-',
    rows: [['0.00', '31.01'], ['0.10', '31.27'], ['0.30', '30.74'], ['0.60', '29.24']],
  },
]

export function exampleRows(example: Example): SheetRow[] {
  return example.rows.map(([x, y]) => ({ ...emptyRow(), x, y }))
}
