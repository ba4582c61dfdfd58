import { checkSheet, columns, emptyRow, type Column, type SheetRow } from '~~/composables/sheet/check'
import { exampleRows, examples, type Example } from '~~/composables/sheet/examples'
import { readTable } from '~~/composables/sheet/table'

/** All that a person has put into the sheet; kept for the tab's life, so that a reload loses nothing. */
interface SheetState {
  rows: SheetRow[]
  hasUncertainty: boolean
  example: Example['name'] | null
  /** what the curve is labelled with; unknown once a table of one's own is pasted */
  ion: string | null
}

const storageKey = 'anionary-sheet'
const mostUndone = 20

function stateOf(example: Example): SheetState {
  return { rows: exampleRows(example), hasUncertainty: false, example: example.name, ion: example.ion }
}

/** There is always one empty row at the foot to type into. */
function withFoot(rows: readonly SheetRow[]): SheetRow[] {
  const last = rows.at(-1)
  const isOpen = last && columns.every(column => last[column] === '')
  return isOpen ? [...rows] : [...rows, emptyRow()]
}

function stored(): SheetState | null {
  try {
    const parsed: unknown = JSON.parse(sessionStorage.getItem(storageKey) ?? 'null')
    const isState = typeof parsed === 'object' && parsed !== null && 'rows' in parsed && Array.isArray(parsed.rows)
    return isState ? parsed as SheetState : null
  }
  catch {
    return null
  }
}

function store(state: SheetState) {
  try {
    sessionStorage.setItem(storageKey, JSON.stringify(state))
  }
  catch {
    // Storage may be full or forbidden; the sheet on the screen is still whole.
  }
}

/** The sheet of the public page: typing, pasting, examples, clearing, and going back. */
export function useSheet() {
  const state = shallowRef<SheetState>(stateOf(examples[0]))
  const undone = shallowRef<SheetState[]>([])
  /** said after a paste that needs a word, such as a head that was left out */
  const remark = shallowRef<{ headLines: number, isMillimolar: boolean } | null>(null)

  const rows = computed(() => withFoot(state.value.rows))
  const checked = computed(() => checkSheet(state.value.rows, state.value.hasUncertainty))

  function change(next: SheetState, isUndoable = true) {
    if (isUndoable) undone.value = [...undone.value.slice(-mostUndone), state.value]
    state.value = next
    if (import.meta.client) store(next)
  }

  function setCell(row: number, column: Column, text: string) {
    const next = rows.value.map((cells, index) => index === row ? { ...cells, [column]: text } : cells)
    change({ ...state.value, rows: trimmed(next), example: null }, false)
  }

  function paste(row: number, column: Column, text: string) {
    const table = readTable(text)
    const from = columns.indexOf(column)
    const next = withFoot(state.value.rows).slice(0, Math.max(row, 0))
    const below = rows.value.slice(row)
    const width = Math.max(...table.rows.map(cells => cells.length), 0)
    table.rows.forEach((cells, index) => {
      const target = { ...(below[index] ?? emptyRow()) }
      columns.slice(from).forEach((name, offset) => {
        const value = cells[offset]
        if (value !== undefined) target[name] = value
      })
      next.push(target)
    })
    next.push(...below.slice(table.rows.length))
    change({ rows: trimmed(next), hasUncertainty: state.value.hasUncertainty || from + width > 2, example: null, ion: null })
    remark.value = table.headLines > 0 || table.isMillimolar ? table : null
  }

  function trimmed(next: SheetRow[]): SheetRow[] {
    const last = next.findLastIndex(cells => columns.some(column => cells[column] !== ''))
    return next.slice(0, last + 1)
  }

  function load(example: Example) {
    remark.value = null
    change(stateOf(example))
  }

  function clear() {
    remark.value = null
    change({ ...state.value, rows: [], example: null, ion: null })
  }

  function undo() {
    const previous = undone.value.at(-1)
    if (!previous) return
    undone.value = undone.value.slice(0, -1)
    change(previous, false)
  }

  /** From mmol/L as pasted to mol/L as the sheet counts. */
  function divideByThousand() {
    const next = state.value.rows.map((cells) => {
      const value = Number(cells.x.replace(',', '.'))
      return cells.x.trim() === '' || !Number.isFinite(value) ? cells : { ...cells, x: String(Number((value / 1000).toPrecision(12))) }
    })
    remark.value = null
    change({ ...state.value, rows: next })
  }

  function setUncertainty(isShown: boolean) {
    change({ ...state.value, hasUncertainty: isShown })
  }

  onMounted(() => {
    const kept = stored()
    if (kept) state.value = kept
  })

  return {
    rows, checked,
    hasUncertainty: computed(() => state.value.hasUncertainty),
    example: computed(() => state.value.example),
    ion: computed(() => state.value.ion),
    canUndo: computed(() => undone.value.length > 0),
    remark: readonly(remark),
    setCell, paste, load, clear, undo, divideByThousand, setUncertainty,
  }
}
