import { gridOfText } from '#shared/tables/grid'
import { understand, type TableContext } from '#shared/tables/understand'
import type { Grid, TableChoices, Understanding } from '#shared/tables/types'
import { gridOfWorkbook } from './workbook'

/** A table and how it is to be read. The bytes come along when a thread has not seen them yet. */
export interface Table {
  sha256: string
  isPaste: boolean
  choices: TableChoices
  context: TableContext
  bytes?: Uint8Array
}

/** Tables that people work on at one time; the largest takes some tens of megabytes. */
const mostKept = 4
const kept = new Map<string, Understanding>()

const isPacked = (bytes: Uint8Array) => bytes[0] === 0x50 && bytes[1] === 0x4B

function gridOf({ isPaste, choices, context: { fileName: name } }: Table, bytes: Uint8Array): Grid | Promise<Grid> {
  if (isPaste) return gridOfText(new TextDecoder().decode(bytes), { name, isPaste }, choices)
  return isPacked(bytes) || isNoText(bytes, name) ? gridOfWorkbook(bytes, choices) : gridOfText(bytes, { name }, choices)
}

/** Bears the name of a workbook and is none, nor a text that only bears the name. */
function isNoText(bytes: Uint8Array, name: string): boolean {
  const isPrintable = (byte: number) => byte >= 0x20 || byte === 0x09 || byte === 0x0A || byte === 0x0D
  return /\.xlsx$/i.test(name) && bytes.length > 0 && !bytes.subarray(0, 1_000).every(isPrintable)
}

/** @returns null where the bytes are needed first @throws TableError where the file cannot be taken */
export async function understandingOf({ bytes, ...table }: Table): Promise<Understanding | null> {
  const key = JSON.stringify(table)
  const known = kept.get(key)
  if (!known && !bytes) return null
  const understanding = known ?? understand(await gridOf(table, bytes!), table.choices, table.context)
  kept.delete(key)
  kept.set(key, understanding)
  for (const oldest of kept.keys()) {
    if (kept.size <= mostKept) break
    kept.delete(oldest)
  }
  return understanding
}
