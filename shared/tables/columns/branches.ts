import { columnsFor, type Plan, type PlannedColumn } from './plan'

/** Cloud points of one salt and branch: one column, or repeats side by side that give one reading. */
export interface Branch {
  columns: readonly PlannedColumn[]
  /** null: the salt of the row */
  salt: string | null
  direction: PlannedColumn['direction']
  uncertainty: PlannedColumn | undefined
}

/** The cloud points that one row can hold, by salt and branch. */
export function branchesOf(plan: Plan): Branch[] {
  const points = columnsFor(plan, 'cloud-point')
  const uncertainties = columnsFor(plan, 'uncertainty')
  const keyOf = ({ salt, direction }: PlannedColumn) => `${salt ?? ''}|${direction ?? ''}`
  return [...new Set(points.map(keyOf))].map((key) => {
    const columns = points.filter(column => keyOf(column) === key)
    const [first] = columns
    return {
      columns, salt: first?.salt ?? null, direction: first?.direction ?? null,
      uncertainty: uncertainties.find(({ of }) => of !== null && columns.some(({ index }) => index === of)) ?? uncertainties.find(({ of }) => of === null),
    }
  })
}
