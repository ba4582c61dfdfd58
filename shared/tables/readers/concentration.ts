import { movePoint, typed, type Decimal } from '../cells/decimal'
import { dateFinding, fault, nothing, quantityOf, quoted, taken, takenFindings, unreadableNumber, type Found, type ReadCell } from './finding'
import type { Plan, PlannedColumn } from '../columns/plan'
import type { Quantity } from '../cells/quantity'
import { saltOf } from '../cells/salt-cache'

export type Scale = 'mol/L' | 'mol/kg'
export interface Concentration { x: Decimal, scale: Scale }

/** No salt dissolves to more than this [mol/L or mol/kg]; larger numbers are in another unit. */
const mostConcentrated = 30

const scaleOf = (unit: string): Scale => unit.endsWith('kg') ? 'mol/kg' : 'mol/L'
const powerOf = (unit: string) => unit.startsWith('m') && !unit.startsWith('mol') ? -3 : 0

function inScale(cell: ReadCell, column: PlannedColumn, reading: Quantity): Found<Concentration> {
  const own = column.unit ?? 'mol/L'
  const stated = reading.unit?.name ?? own
  const scale = scaleOf(own)
  const x = movePoint(reading.number, powerOf(stated))
  if (reading.unit && (reading.unit.of !== 'concentration' || scaleOf(stated) !== scale)) {
    return { value: null, findings: [fault(column.index, 'unit-in-cell', `${cell.text.trim()} in a column of ${own}`, `It is not changed into ${scale} without being asked. Type the value in ${own}.`)] }
  }
  if (reading.unit && stated !== own && column.unit !== null) {
    const value = typed(movePoint(x, -powerOf(own)))
    return { value: { x, scale }, findings: [taken(column.index, 'unit-in-cell', `Reads as ${value} ${own}`, `The column is in ${own}; this cell says ${reading.unit.name}. Taken as ${value}.`, value)] }
  }
  return { value: { x, scale }, findings: [] }
}

/** A concentration in mol/L or mol/kg, whatever the cell and its column are written in. An empty cell gives nothing and no finding. */
export function readConcentration(cell: ReadCell, column: PlannedColumn, plan: Plan): Found<Concentration> {
  const { index } = column
  const reading = quantityOf(cell, column, plan)
  if (reading.kind === 'empty' && cell.formula === undefined) return nothing
  if (reading.kind === 'date') return { value: null, findings: [dateFinding(cell, column)] }
  if (reading.kind === 'not-determined') return { value: null, findings: [fault(index, 'not-determined', `No concentration: ${cell.text.trim()}`, 'Type the concentration, or leave the row out.')] }
  if (reading.kind !== 'number') {
    if (saltOf(cell.text).kind === 'blank' && cell.text.trim() !== '') return { value: { x: { value: 0, text: '0', decimals: 0 }, scale: scaleOf(column.unit ?? 'mol/L') }, findings: [] }
    return { value: null, findings: [unreadableNumber(cell, index, reading.kind, 'concentration')] }
  }
  if (reading.limit !== 'exact') {
    return { value: null, findings: [fault(index, reading.limit === 'below' ? 'below-limit' : 'above-limit', `A limit, not a concentration: ${cell.text.trim()}`, 'A reading needs the concentration itself. Type it, or leave the row out.')] }
  }
  const { value, findings } = inScale(cell, column, reading)
  if (!value) return { value, findings }
  if (value.x.value < 0) {
    const positive = typed(reading.number).replace('-', '')
    return { value: null, findings: [fault(index, 'negative-concentration', `A negative concentration: ${cell.text.trim()}`, `If the sign is a slip, it is ${positive}. Type the concentration, or leave the row out.`, positive)] }
  }
  if (value.x.value > mostConcentrated && !column.isUnitOpen) {
    return { value: null, findings: [fault(index, 'outside-range', `${value.x.text} ${value.scale} is more than any salt dissolves to`, `Is ${quoted(cell.text)} in another unit? Type the value with its unit, such as ${reading.number.text} mM.`, `${reading.number.text} ${value.scale === 'mol/L' ? 'mM' : 'mmol/kg'}`)] }
  }
  const stated = reading.uncertainty ? [taken(index, 'stated-uncertainty', `Reads as ${reading.number.text}`, 'Concentrations are taken as exact; their uncertainty stays with the file.')] : []
  return { value, findings: [...findings, ...stated, ...takenFindings(cell, column, reading, plan)] }
}
