import { pointOf, type Point } from './branch-reading'
import type { Branch } from '../columns/branches'
import { fault, nothing, quoted, type Finding, type Found, type ReadCell } from '../readers/finding'
import { keptFinding } from './kept-rows'
import { columnFor } from '../columns/plan'
import { readConcentration, type Concentration } from '../readers/concentration'
import { readDateCell, readDirection, readLimit, readPlainNumber, readSamples } from '../readers/others'
import { readSaltCell, type NamedSalt } from '../readers/salt'
import type { RowContext, RowReading } from './row-context'
import { placeOf, type Place } from './row-place'
import { wordsOfRow } from './row-words'
import type { FoundReading } from '../types'

const noText: ReadCell = { text: '' }

/** Reads what was measured in a row: its place on the curve, its cloud points and what is told about them. */
export function readMeasured(cells: readonly ReadCell[], context: RowContext): RowReading {
  const { plan, branches } = context
  const cellAt = (column: number) => cells[column] ?? noText
  const optional = <T>(meaning: Parameters<typeof columnFor>[1], read: (cell: ReadCell, column: NonNullable<ReturnType<typeof columnFor>>) => Found<T>): Found<T> => {
    const column = columnFor(plan, meaning)
    return column ? read(cellAt(column.index), column) : { value: null, findings: [] }
  }
  const samples = optional('samples', (cell, column) => readSamples(cell, column, plan))
  const points = branches.map(branch => ({ branch, ...pointOf(cellAt, branch, plan, samples.value) }))
  const named = optional('salt', (cell, column) => readSaltCell(cell, column.index))
  const stated = optional('concentration', (cell, column) => readConcentration(cell, column, plan))
  // A dash beside "blank" says that there is no salt, not that its amount is missing.
  const isDash = named.value?.salt === null && stated.findings.some(({ code }) => code === 'not-determined')
  const concentration = isDash ? nothing : stated
  const others = {
    date: optional('date', (cell, column) => readDateCell(cell, column, plan)),
    direction: optional('direction', readDirection),
    limit: optional('limit', readLimit),
    rate: optional('rate', (cell, column) => readPlainNumber(cell, column, plan, 'rate')),
    ph: optional('pH', (cell, column) => readPlainNumber(cell, column, plan, 'pH')),
  }
  const words = wordsOfRow(cells, context)
  const found = points.flatMap(({ point, branch }) => point ? [{ point, branch }] : [])
  const pointFindings = points.flatMap(({ findings }) => findings)
  const findings = [...samples.findings, ...concentration.findings, ...aboutSalt(named, concentration), ...Object.values(others).flatMap(other => other.findings), ...words.findings]
  if (found.length === 0) return withoutPoint([...findings, ...pointFindings], pointFindings, context)
  const place = placeOf(concentration, named, found, context)
  const readings = place.value === null
    ? []
    : found.flatMap(({ point, branch }) => readingOf(point, branch, place.value, {
        direction: branch.direction ?? others.direction.value, limit: point.limit === 'exact' ? others.limit.value ?? 'exact' : point.limit,
        rate: others.rate.value, ph: others.ph.value, date: others.date.value, ...words.value,
      }))
  return { findings: [...findings, ...pointFindings, ...place.findings], readings: onceEach(readings) }
}

/** Where there is no salt, its name does not matter: "control" at concentration 0 is a blank. */
function aboutSalt(named: Found<NamedSalt>, concentration: Found<Concentration>): Finding[] {
  const isBlank = concentration.value?.x.value === 0
  return named.findings.filter(({ tone, suggestion }) => !isBlank || tone === 'taken' || suggestion !== undefined)
}

/** A row that gives no cloud point is kept, unless something in it could not be read. */
function withoutPoint(findings: Finding[], pointFindings: readonly Finding[], { plan, branches }: RowContext): RowReading {
  if (branches.length === 0) {
    return { findings: [...findings, fault(null, 'no-cloud-point', 'No column of cloud points', 'Say which column holds the cloud points.')], readings: [] }
  }
  if (pointFindings.some(({ tone }) => tone !== 'taken')) return { findings, readings: [] }
  const undetermined = pointFindings.find(({ code }) => code === 'not-determined')
  const kept = undetermined
    ? keptFinding('not-determined', undetermined.message, 'No cloud point to take. Kept with the file, not a reading.', undetermined.column)
    : keptFinding('no-cloud-point', 'No cloud point', `Nothing stands under ${quoted(plan.columns.find(({ meaning }) => meaning === 'cloud-point')?.header ?? 'cloud point')}. Kept with the file, not a reading.`)
  return { findings: [kept], readings: [] }
}

type About = Pick<FoundReading, 'direction' | 'limit' | 'rate' | 'ph' | 'date' | 'batch' | 'note' | 'setAside'>

function readingOf(point: Point, branch: Branch, place: Place | null, about: About): FoundReading[] {
  if (!place) return []
  const salt = place.x === 0 ? null : branch.salt ?? place.salt
  return [{ row: 0, ...point, salt, x: place.x, scale: place.scale, ...about }]
}

/** A blank that stands under every salt of a wide row is one measurement. */
function onceEach(readings: readonly FoundReading[]): FoundReading[] {
  const keyOf = ({ x, y, direction, limit }: FoundReading) => x === 0 ? `${y}|${direction}|${limit}` : null
  return readings.filter((reading, index) => keyOf(reading) === null || readings.findIndex(other => keyOf(other) === keyOf(reading)) === index)
}
