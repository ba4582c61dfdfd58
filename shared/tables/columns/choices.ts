import { saltFormula } from '../cells/salt-cache'
import type { ColumnChoice, TableChoices } from '../types'
import { branchOf, keep, single } from './column-roles'
import { unitFor, type HeadedColumn } from './columns'

function withoutUndefined<T extends object>(values: T): Partial<T> {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as Partial<T>
}

function chosen(column: HeadedColumn, said: ColumnChoice): HeadedColumn {
  const isNew = said.meaning !== undefined && said.meaning !== column.meaning
  const fresh = isNew ? { unit: unitFor(said.meaning ?? column.meaning, column.units), uncertaintyMeaning: null, isUncertaintyCertain: false } : {}
  return { ...column, ...fresh, ...withoutUndefined({ ...said, salt: said.salt ? saltFormula(said.salt) : said.salt }) }
}

/** Applies what a person says about columns. What there is one of moves to the column they name; the one it was taken for stays with the file. */
export function withChoices(columns: readonly HeadedColumn[], { columns: choices = [] }: TableChoices): HeadedColumn[] {
  const said = new Map(choices.map(choice => [choice.index, choice]))
  const applied = columns.map((column) => {
    const choice = said.get(column.index)
    return choice ? chosen(column, choice) : column
  })
  const named = applied.filter((column, place) => said.get(column.index)?.meaning !== undefined && column.meaning !== columns[place]?.meaning)
  const isDisplaced = (column: HeadedColumn) => !said.has(column.index) && named.some(other => other.meaning === column.meaning
    && (single.includes(column.meaning) || (column.meaning === 'cloud-point' && branchOf(other) === branchOf(column))))
  return applied.map(column => isDisplaced(column) ? keep(column) : column)
}
