import type { FitResult } from '#shared/science/fitting/types'

/** The two fits of a table: with binding, and the straight line alone; null where the readings are too few for one. */
export interface TableFits {
  binding: FitResult | null
  line: FitResult | null
}
