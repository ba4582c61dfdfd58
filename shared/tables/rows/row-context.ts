import type { Branch } from '../columns/branches'
import type { Finding } from '../readers/finding'
import type { Head } from '../columns/head'
import type { Plan } from '../columns/plan'
import type { FoundReading } from '../types'

/** What the rows above say about the rows below. */
export interface RowContext {
  head: Head
  plan: Plan
  branches: readonly Branch[]
  width: number
  /** salt named by a row of its own above; null: none */
  sectionSalt: string | null
  /** salt of the row above, for cells left empty beneath it */
  saltAbove: string | null
}

/** What the cells of a row gave. */
export interface RowReading { findings: Finding[], readings: FoundReading[] }
