import { celsiusOfFahrenheit, celsiusOfKelvin, decimalOfDouble, kelvinOfFahrenheitStep, typed, type Decimal } from '../cells/decimal'
import { dayOfSerial } from '../cells/dates'
import { dateFinding, fault, nothing, quantityOf, taken, takenFindings, undecided, unreadableNumber, type Finding, type Found, type ReadCell } from './finding'
import type { Plan, PlannedColumn } from '../columns/plan'
import type { Quantity } from '../cells/quantity'

export interface Temperature {
  y: Decimal
  limit: 'exact' | 'below' | 'above'
  /** what the cell itself states [K] */
  stated: { number: Decimal, isConcise: boolean } | null
}

const lowest = 0
const highest = 100
/** What a reading that is set aside may still say; beyond it no number is a temperature. */
const isThinkable = (value: number) => value > -273.15 && value < 1000
const isInRange = (value: number) => value >= lowest && value <= highest

function celsiusOf(number: Decimal, unit: string | null): Decimal {
  if (unit === 'K') return celsiusOfKelvin(number)
  return unit === '°F' ? celsiusOfFahrenheit(number) : number
}

function kelvinStepOf(number: Decimal, unit: string | null): Decimal {
  return unit === '°F' ? kelvinOfFahrenheitStep(number) : number
}

/** 318.6 with a point after two digits: 31.86. */
function withPointMoved(number: Decimal): Decimal | null {
  for (let power = 1; power <= 4; power++) {
    const moved = decimalOfDouble(Number(`${number.value}e-${power}`))
    if (isInRange(moved.value) && number.value > highest) return moved
  }
  return null
}

/** The finding on a temperature that no water has, with the likeliest slip: a lost point, kelvin, or a date's number. */
function outsideRange(cell: ReadCell, column: PlannedColumn, reading: Quantity): Finding {
  const { number } = reading
  const unit = reading.unit?.name ?? column.unit ?? '°C'
  const message = `${typed(number)} ${unit} is outside 0 to 100 °C`.replace('°C is outside 0 to 100 °C', '°C is outside 0 to 100')
  const day = Number.isInteger(number.value) ? dayOfSerial(number.value) : null
  if (day && unit === '°C') return { ...dateFinding({ text: day }, column), message: `The number of a date: ${typed(number)}` }
  if (unit !== '°C') {
    const slip = isInRange(number.value) ? `${typed(number)} °C` : undefined
    return undecided(column.index, 'outside-range', message, slip ? `It may be in °C. Agree, or type the value in ${unit}.` : `Type the value in ${unit}, or set the reading aside.`, slip)
  }
  const kelvin = celsiusOfKelvin(number)
  const asTyped = (celsius: Decimal) => column.unit === null || column.unit === '°C' ? typed(celsius) : `${typed(celsius)} °C`
  const moved = withPointMoved(number)
  const middle = column.middle === null ? kelvin.value : celsiusOf(decimalOfDouble(column.middle), column.unit).value
  const isKelvin = isInRange(kelvin.value) && (!moved || Math.abs(kelvin.value - middle) <= Math.abs(moved.value - middle))
  if (isKelvin) return undecided(column.index, 'kelvin', `${typed(number)} °C may be kelvin`, `${typed(number)} K is ${typed(kelvin)} °C. Agree, type the value, or set the reading aside.`, asTyped(kelvin))
  if (moved) return fault(column.index, 'outside-range', message, `A missing decimal point would give ${typed(moved)}. Type the value, or set the reading aside.`, asTyped(moved))
  return fault(column.index, 'outside-range', message, 'Type the value, or set the reading aside.')
}

function aboutUnit(cell: ReadCell, column: PlannedColumn, reading: Quantity, y: Decimal): Finding[] {
  const unit = reading.unit?.name
  if (!unit || unit === (column.unit ?? '°C')) return []
  const detail = `The column is in ${column.unit ?? '°C'}; this cell says ${unit}.`
  return [taken(column.index, unit === '°F' ? 'fahrenheit' : unit === 'K' ? 'kelvin' : 'unit-in-cell', `Reads as ${typed(y)} °C`, detail)]
}

function aboutLimit(column: PlannedColumn, { limit }: Quantity, y: Decimal): Finding[] {
  if (limit === 'exact') return []
  return [taken(column.index, limit === 'below' ? 'below-limit' : 'above-limit', `A limit: ${limit} ${typed(y)} °C`, 'Drawn as an arrow and left out of the fit.')]
}

function aboutUncertainty(column: PlannedColumn, reading: Quantity): Finding[] {
  if (!reading.uncertainty) return []
  return [taken(column.index, 'stated-uncertainty', `Reads as ${typed(reading.number)} with uncertainty ${typed(reading.uncertainty.number)}`, 'The cell states its own uncertainty.')]
}

/**
 * A cloud point in °C, whatever the cell and its column are written in. An empty cell gives nothing and no finding.
 * Outside 0 to 100 °C the value comes back beside its fault, so that a person may keep it set aside.
 */
export function readTemperature(cell: ReadCell, column: PlannedColumn, plan: Plan): Found<Temperature> {
  const { index } = column
  const reading = quantityOf(cell, column, plan)
  if (reading.kind === 'empty' && cell.formula === undefined) return nothing
  if (reading.kind === 'date') return { value: null, findings: [dateFinding(cell, column)] }
  if (reading.kind === 'not-determined') return { value: null, findings: [taken(index, 'not-determined', `Not determined: ${cell.text.trim()}`, 'No cloud point is taken from this cell.')] }
  if (reading.kind !== 'number') return { value: null, findings: [unreadableNumber(cell, index, reading.kind, 'cloud point')] }
  if (reading.unit && reading.unit.of !== 'temperature') {
    return { value: null, findings: [fault(index, 'unit-in-cell', `Not a temperature: ${cell.text.trim()}`, 'Type the cloud point, or leave the row out.')] }
  }
  const unit = reading.unit?.name ?? column.unit
  const y = celsiusOf(reading.number, unit)
  const stated = reading.uncertainty && { ...reading.uncertainty, number: kelvinStepOf(reading.uncertainty.number, unit) }
  const value = { y, limit: reading.limit, stated }
  if (!isInRange(y.value) && !column.isUnitOpen) return { value: isThinkable(y.value) ? value : null, findings: [outsideRange(cell, column, reading)] }
  return { value, findings: [...aboutUnit(cell, column, reading, y), ...aboutLimit(column, reading, y), ...aboutUncertainty(column, reading), ...takenFindings(cell, column, reading, plan)] }
}

/** The uncertainty of a cloud point [K]; limits such as <0.1 are taken at their bound. */
export function readUncertainty(cell: ReadCell, column: PlannedColumn, plan: Plan): Found<Decimal> {
  const reading = quantityOf(cell, column, plan)
  if ((reading.kind === 'empty' && cell.formula === undefined) || reading.kind === 'not-determined') return nothing
  if (reading.kind === 'date') return { value: null, findings: [dateFinding(cell, column)] }
  const bare = reading.kind === 'text' ? quantityOf({ text: cell.text.replace(/^\s*(?:±|\+\/?-)\s*/, ''), isCorrected: cell.isCorrected }, column, plan) : reading
  if (bare.kind !== 'number' || bare.number.value < 0) return { value: null, findings: [unreadableNumber(cell, column.index, bare.kind, 'positive uncertainty')] }
  const value = kelvinStepOf(bare.number, bare.unit?.name ?? column.unit)
  const limit = bare.limit === 'exact' ? [] : [taken(column.index, 'below-limit', `A limit: ${cell.text.trim()}`, `Taken as ${typed(value)} K.`)]
  return { value, findings: [...limit, ...takenFindings(cell, column, bare, plan)] }
}
