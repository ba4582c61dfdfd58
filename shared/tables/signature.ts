import { fold } from './cells/fold'
import type { Understanding } from './types'

/** Headings in one line, the same for every file of one kind: a lab's recipe is found by it. */
export function signatureOf({ headerRow, columns }: Pick<Understanding, 'headerRow' | 'columns'>): string {
  if (headerRow === null) return `${columns.length} columns without header`
  // Remarks behind the last heading come and go.
  return columns.map(({ header }) => fold(header).replace(/\s+/g, ' ')).join(' | ').replace(/(?: \| )+$/, '')
}
