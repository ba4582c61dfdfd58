import type { Point } from './branch-reading'
import type { Branch } from '../columns/branches'
import { fault, undecided, type Finding, type Found } from '../readers/finding'
import { columnFor, type Plan } from '../columns/plan'
import type { Concentration } from '../readers/concentration'
import type { NamedSalt } from '../readers/salt'
import type { RowContext } from './row-context'

export interface Place { x: number, scale: Concentration['scale'], salt: string | null }

type Measured = readonly { point: Point, branch: Branch }[]

/** The salt and concentration of a row; a blank has neither. */
export function placeOf(concentration: Found<Concentration>, named: Found<NamedSalt>, found: Measured, context: RowContext): Found<Place> {
  const { plan } = context
  const scale = concentration.value?.scale ?? (columnFor(plan, 'concentration')?.unit?.endsWith('kg') ? 'mol/kg' : 'mol/L')
  const isNamedBlank = named.value !== null && named.value.salt === null
  const x = concentration.value?.x.value ?? null
  if (x === 0 || (isNamedBlank && x === null && concentration.findings.length === 0)) return { value: { x: 0, scale, salt: null }, findings: [] }
  if (isNamedBlank && x !== null) {
    const column = columnFor(plan, 'concentration')?.index ?? null
    return { value: null, findings: [undecided(column, 'no-salt', `A blank with ${x} ${scale}`, 'A blank has no salt. Agree to take its concentration as 0, or type the salt.', '0')] }
  }
  const salt = saltFor(named, found, context)
  const missing = x === null && concentration.findings.length === 0 ? [noConcentration(plan)] : []
  return { value: x === null || salt.value === null ? null : { x, scale, salt: salt.value.salt }, findings: [...missing, ...salt.findings] }
}

function noConcentration(plan: Plan): Finding {
  const column = columnFor(plan, 'concentration')
  if (!column) return fault(null, 'no-concentration', 'No column of concentrations', 'Say which column holds the concentrations.')
  return fault(column.index, 'no-concentration', 'No concentration', 'Type the concentration, or leave the row out; it is kept with the file either way.')
}

/** The salt of a row: its own, its columns', that of the rows or the table above. */
function saltFor(named: Found<NamedSalt>, found: Measured, { plan, sectionSalt, saltAbove }: RowContext): Found<NamedSalt> {
  if (named.value) return { value: named.value, findings: [] }
  if (named.findings.length > 0) return { value: null, findings: [] }
  const isNeeded = found.some(({ branch }) => branch.salt === null)
  const known = sectionSalt ?? plan.salt
  if (!isNeeded || known !== null) return { value: { salt: known }, findings: [] }
  const column = columnFor(plan, 'salt')
  // Without any column of salts the table's salt is asked for once, not row by row.
  if (!column) return { value: { salt: null }, findings: [] }
  if (saltAbove === null) return { value: null, findings: [fault(column.index, 'no-salt', 'No salt', 'Type the salt, or leave the row out; it is kept with the file either way.')] }
  return { value: null, findings: [undecided(column.index, 'no-salt', `No salt; ${saltAbove} stands above`, `Agree if the row belongs to ${saltAbove}, or type the salt.`, saltAbove)] }
}
