import type { TableFits } from './tableFits'
import { checkSheet } from './sheet/check'
import { exampleRows, examples } from './sheet/examples'

/**
 * The fits of the first example, made on the server so that constants and notes are there before any script has run.
 * In the browser there are none: the page asks the fit route, and the engine stays out of the bundle.
 */
export async function exampleFits(): Promise<TableFits | null> {
  if (!import.meta.server) return null
  const { fit } = await import('#shared/science/fitting')
  const points = checkSheet(exampleRows(examples[0]), false).readings.map(({ x, y }) => ({ x, y }))
  return { binding: fit({ model: 'linear-langmuir', points }), line: fit({ model: 'linear', points }) }
}
