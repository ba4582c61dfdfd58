import { decimalOf, movePoint, typed, type Decimal } from '../cells/decimal'
import { dateFinding, fault, nothing, quantityOf, taken, takenFindings, unreadableNumber, type Finding, type Found, type ReadCell } from './finding'
import type { Plan, PlannedColumn } from '../columns/plan'
import type { Quantity, QuantityReading } from '../cells/quantity'
import { saltOf } from '../cells/salt-cache'

export type Scale = 'mol/L' | 'mol/kg'
export interface Concentration { x: Decimal, scale: Scale }

/** No salt dissolves to more than this [mol/L or mol/kg]; larger numbers are in another unit. */
const mostConcentrated = 30

const scaleOf = (unit: string): Scale => unit.endsWith('kg') ? 'mol/kg' : 'mol/L'
const powerOf = (unit: string) => unit.startsWith('m') && !unit.startsWith('mol') ? -3 : 0

const refused = (finding: Finding): Found<Concentration> => ({ value: null, findings: [finding] })

function inScale(cell: ReadCell, column: PlannedColumn, reading: Quantity): Found<Concentration> {
  const own = column.unit ?? (reading.unit?.of === 'concentration' ? reading.unit.name : 'mol/L')
  const stated = reading.unit?.name ?? own
  const scale = scaleOf(own)
  const x = movePoint(reading.number, powerOf(stated))
  if (reading.unit && (reading.unit.of !== 'concentration' || scaleOf(stated) !== scale)) {
    return refused(fault(column.index, 'unit-in-cell', `${cell.text.trim()} in a column of ${own}`, `It is not changed into ${scale} without being asked. Type the value in ${own}.`))
  }
  if (stated === own) return { value: { x, scale }, findings: [] }
  const value = typed(movePoint(x, -powerOf(own)))
  return { value: { x, scale }, findings: [taken(column.index, 'unit-in-cell', `Reads as ${value} ${own}`, `The column is in ${own}; this cell says ${stated}. Taken as ${value}.`, value)] }
}

/** A concentration that no solution has, with what was probably meant. */
function impossible(cell: ReadCell, column: PlannedColumn, { number, unit }: Quantity, { x, scale }: Concentration): Finding | null {
  const withUnit = unit ? ` ${unit.name}` : ''
  if (x.value < 0) {
    const positive = `${typed(number).replace('-', '')}${withUnit}`
    return fault(column.index, 'negative-concentration', `A negative concentration: ${cell.text.trim()}`, `If the sign is a slip, it is ${positive}. Type the concentration, or leave the row out.`, positive)
  }
  if (x.value <= mostConcentrated || column.isUnitOpen) return null
  const message = `${typed(x)} ${scale} is more than any salt dissolves to`
  // A number with a unit of its own means what it says; one without may be in thousandths.
  if (unit || powerOf(column.unit ?? 'mol/L') !== 0) return fault(column.index, 'outside-range', message, 'Type the concentration, or leave the row out.')
  const smaller = `${typed(number)} ${scale === 'mol/L' ? 'mM' : 'mmol/kg'}`
  return fault(column.index, 'outside-range', message, `Is it ${smaller}? Type the value with its unit.`, smaller)
}

function withoutNumber(cell: ReadCell, column: PlannedColumn, kind: Exclude<QuantityReading['kind'], 'number'>): Found<Concentration> {
  if (kind === 'date') return refused(dateFinding(cell, column))
  if (kind === 'not-determined') return refused(fault(column.index, kind, `No concentration: ${cell.text.trim()}`, 'Type the concentration, or leave the row out.'))
  const isBlank = cell.text.trim() !== '' && saltOf(cell.text).kind === 'blank'
  return isBlank ? { value: { x: decimalOf('0'), scale: scaleOf(column.unit ?? 'mol/L') }, findings: [] } : refused(unreadableNumber(cell, column.index, kind, 'concentration'))
}

/** A concentration in mol/L or mol/kg, whatever the cell and its column are written in. An empty cell gives nothing and no finding. */
export function readConcentration(cell: ReadCell, column: PlannedColumn, plan: Plan): Found<Concentration> {
  const { index } = column
  const reading = quantityOf(cell, column, plan)
  if (reading.kind === 'empty' && cell.formula === undefined) return nothing
  if (reading.kind !== 'number') return withoutNumber(cell, column, reading.kind)
  if (reading.limit !== 'exact') {
    const code = reading.limit === 'below' ? 'below-limit' : 'above-limit'
    return refused(fault(index, code, `A limit, not a concentration: ${cell.text.trim()}`, 'A reading needs the concentration itself. Type it, or leave the row out.'))
  }
  const { value, findings } = inScale(cell, column, reading)
  if (!value) return { value, findings }
  const slip = impossible(cell, column, reading, value)
  if (slip) return refused(slip)
  const stated = reading.uncertainty ? [taken(index, 'stated-uncertainty', `Reads as ${typed(reading.number)}`, 'Concentrations are taken as exact; their uncertainty stays with the file.')] : []
  return { value, findings: [...findings, ...stated, ...takenFindings(cell, column, reading, plan)] }
}
