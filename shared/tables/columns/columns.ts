import { fold, tidy } from '../cells/fold'
import { isGroupHeading, type Head } from './head'
import { hasForeignUnit, headerText } from './header-text'
import { directionOf, meaningOf, uncertaintyWordOf } from './header-words'
import { saltAmong, suggestedSalt } from '../cells/salt-cache'
import type { ColumnMeaning, GridRow, TableColumn } from '../types'
import { unitOf, type Unit } from '../cells/units'

/** What the head says about a column, before its values are looked at. */
export interface HeadedColumn extends TableColumn {
  /** heading without unit, folded */
  name: string
  /** units that its head states, whatever they measure */
  units: readonly Unit[]
  /** true: its head states an amount in a unit such as g/L, which is not converted */
  isForeign: boolean
  /** salt that its heading nearly names, to be asked about: an anion alone, a slip of spelling */
  nearSalt: string | null
  /** true: the meaning of its uncertainty leaves no doubt */
  isUncertaintyCertain: boolean
}

const meaningsOfUnits: Record<Unit['of'], ColumnMeaning> = { concentration: 'concentration', temperature: 'cloud-point', rate: 'rate' }

function meaningFor(name: string, unit: Unit | null, salt: string | null): ColumnMeaning {
  const meaning = meaningOf(name)
  // "NaCl (mM)" and "salt / M" hold amounts of a salt, not its name.
  if (unit?.of === 'concentration' && (meaning === null || meaning === 'salt')) return 'concentration'
  if (meaning) return meaning
  if (salt !== null || directionOf(name) !== null) return 'cloud-point'
  return unit ? meaningsOfUnits[unit.of] : 'kept'
}

/** The unit that can belong to a meaning: K to a temperature and its uncertainty, mM to a concentration. */
export function unitFor(meaning: ColumnMeaning, units: readonly Unit[]): string | null {
  return units.find(unit => meaning === meaningsOfUnits[unit.of] || (meaning === 'uncertainty' && unit.of === 'temperature'))?.name ?? null
}

function columnOf(index: number, header: string, unitText: string): HeadedColumn {
  const { name, unit: stated } = headerText(header)
  const salt = saltAmong(header)
  const nearSalt = salt === null && meaningOf(name) === null ? suggestedSalt(header) : null
  const below = unitOf(unitText.replace(/^\s*[([]|[)\]]\s*$/g, ''))
  const meaning = meaningFor(name, stated ?? below, salt ?? nearSalt)
  const units = [below, stated].filter(unit => unit !== null)
  // The sd of "Tcp ± sd" stands in the cloud point's own cells.
  const uncertainty = meaning === 'uncertainty' ? name : /(?:±|\+\/?-)\s*(.+)$/.exec(name)?.[1]
  const word = uncertainty === undefined ? null : uncertaintyWordOf(uncertainty)
  const isBranch = meaning === 'cloud-point' || meaning === 'uncertainty'
  return {
    index, header: tidy(header.replace(/\s+/g, ' ')), name, meaning,
    unit: unitFor(meaning, units), units,
    direction: isBranch ? directionOf(name) : null,
    salt: isBranch ? salt ?? nearSalt : meaning === 'concentration' ? salt : null,
    nearSalt, isForeign: hasForeignUnit(`${header} ${unitText}`),
    uncertaintyMeaning: word?.meaning ?? null,
    isUncertaintyCertain: word?.isCertain ?? false,
    of: null,
  }
}

/** Headings that stand over several columns hold for each of them up to the next. */
function spread(row: GridRow | null, width: number): string[] {
  const texts: string[] = []
  for (let index = 0; index < width; index++) {
    const own = row?.cells[index]?.text.trim() ?? ''
    const before = texts[index - 1] ?? ''
    texts.push(own === '' && isGroupHeading(before) ? before : own)
  }
  return texts
}

/** What the head says about each column. */
export function headedColumns({ header, units, group }: Head, width: number): HeadedColumn[] {
  const over = spread(group, width)
  return Array.from({ length: width }, (_, index) => {
    const own = header?.cells[index]?.text ?? ''
    return columnOf(index, [over[index], own].filter(Boolean).join(' '), units?.cells[index]?.text ?? '')
  })
}

export interface Repeat { stem: string, place: number }

/** Repeats of one measurement have headings that differ by a number or letter alone: T1 T2 T3, Tcp (a) Tcp (b). */
export function repeatOf(name: string): Repeat | null {
  const match = /^(.*?)[ ([#-]*(\d{1,2}|(?<=[ (])[a-f])[)\]]?$/.exec(fold(name))
  if (!match) return null
  const [, stem = '', mark = ''] = match
  return { stem: stem.trim(), place: /\d/.test(mark) ? Number(mark) : mark.charCodeAt(0) }
}

/** T1 T2 T3 follow each other; T10 T50 T90 are three kinds of temperature. */
export function areConsecutive(repeats: readonly Repeat[]): boolean {
  const places = repeats.map(({ place }) => place).sort((one, other) => one - other)
  return places.length > 1 && places.every((place, index) => index === 0 || place === (places[index - 1] ?? 0) + 1)
}
