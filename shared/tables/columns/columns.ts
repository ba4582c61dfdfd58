import { fold, tidy } from '../cells/fold'
import { isGroupHeading, type Head } from './head'
import { headerText } from './header-text'
import { directionOf, meaningOf, uncertaintyWordOf } from './header-words'
import { saltAmong } from '../cells/salt-cache'
import type { ColumnMeaning, GridRow, TableColumn } from '../types'
import { unitOf, type Unit } from '../cells/units'

/** What the head says about a column, before its values are looked at. */
export interface HeadedColumn extends TableColumn {
  /** heading without unit, folded */
  name: string
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

/** Whether a unit can belong to a meaning: K to a temperature and its uncertainty, mM to a concentration. */
function fits(unit: Unit, meaning: ColumnMeaning): boolean {
  return meaning === meaningsOfUnits[unit.of] || (meaning === 'uncertainty' && unit.of === 'temperature')
}

function columnOf(index: number, header: string, unitText: string): HeadedColumn {
  const { name, unit: stated } = headerText(header)
  const salt = saltAmong(header)
  const below = unitOf(unitText.replace(/^\s*[([]|[)\]]\s*$/g, ''))
  const meaning = meaningFor(name, stated ?? below, salt)
  const unit = [below, stated].find(candidate => candidate && fits(candidate, meaning)) ?? null
  const word = meaning === 'uncertainty' ? uncertaintyWordOf(name) : null
  const isBranch = meaning === 'cloud-point' || meaning === 'uncertainty'
  return {
    index, header: tidy(header.replace(/\s+/g, ' ')), name, meaning,
    unit: unit?.name ?? null,
    direction: isBranch ? directionOf(name) : null,
    salt: isBranch || meaning === 'concentration' ? salt : null,
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

export function headedColumns({ header, units, group }: Head, width: number): HeadedColumn[] {
  const over = spread(group, width)
  return Array.from({ length: width }, (_, index) => {
    const own = header?.cells[index]?.text ?? ''
    return columnOf(index, [over[index], own].filter(Boolean).join(' '), units?.cells[index]?.text ?? '')
  })
}

/** Repeats of one measurement have headings that differ by a number or letter alone: T1 T2 T3, Tcp (a) Tcp (b). */
export function repeatStem(name: string): string | null {
  const match = /^(.*?)[ ([#-]*(?:\d{1,2}|(?<=[ (])[a-f])[)\]]?$/.exec(fold(name))
  return match ? match[1]?.trim() ?? null : null
}
