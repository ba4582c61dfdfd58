import type { HeadedColumn } from './columns'

/** The headings of readings as this service exports them, units aside; such a file comes back without a question, digit for digit. */
export const exportedHeadings = [
  'salt', 'concentration', 'cloud point', 'standard uncertainty', 'samples', 'direction', 'limit', 'batch', 'measured on', 'rate', 'pH', 'set aside because', 'note',
] as const

export function isOwnExport(columns: readonly HeadedColumn[]): boolean {
  return columns.length === exportedHeadings.length && columns.every((column, index) => column.name === exportedHeadings[index]?.toLowerCase())
}
