import type { ChangeImport } from '#shared/contracts/imports'
import type { ColumnChoice, Decision, TableChoices } from '#shared/tables/types'

/** What was said about one sheet, or about cells cut otherwise, does not hold for another. */
const recutting = ['sheet', 'delimiter'] as const

/** A column that now means something else starts afresh: its unit was the other meaning's. */
function mergeColumns(before: readonly ColumnChoice[], given: readonly ColumnChoice[]): ColumnChoice[] {
  const columns = new Map(before.map(choice => [choice.index, choice]))
  for (const choice of given) {
    const known = columns.get(choice.index)
    const isAnother = choice.meaning !== undefined && choice.meaning !== known?.meaning
    columns.set(choice.index, isAnother ? choice : { ...known, ...choice })
  }
  return [...columns.values()].sort((a, b) => a.index - b.index)
}

/** The words before stay as far as a newer one does not take them back. */
function mergeDecisions(before: readonly Decision[], given: readonly Decision[]): Decision[] {
  const reopenedRows = new Set(given.filter(({ action, column }) => action === 'reopen' && column === null).map(({ row }) => row))
  const renewed = new Set(given.filter(({ action }) => action === 'reopen' || action === 'correct').map(({ row, column }) => `${row}|${column}`))
  return [...before.filter(({ row, column }) => !reopenedRows.has(row) && !renewed.has(`${row}|${column}`)), ...given]
}

/** Adds what a person says to what was said: parts are replaced, columns merged one by one, decisions and answers added. */
export function mergeChoices(held: TableChoices, given: ChangeImport): TableChoices {
  const { columns, answers, decisions, ...parts } = given
  const isRecut = recutting.some(part => parts[part] !== undefined && parts[part] !== held[part])
  const { columns: _, decisions: __, headerRow: ___, unitsRow: ____, ...rest } = held
  const before: TableChoices = isRecut ? rest : held
  const answered = [...before.answers ?? [], ...answers ?? []]
  const newest = new Map(answered.map(answer => [`${answer.code}|${answer.subject}`, answer]))
  return {
    ...before, ...parts,
    ...(columns && { columns: mergeColumns(before.columns ?? [], columns) }),
    ...(newest.size > 0 && { answers: [...newest.values()] }),
    ...(decisions && { decisions: mergeDecisions(before.decisions ?? [], decisions) }),
  }
}
