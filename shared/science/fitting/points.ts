/** Which readings enter a fit, and as what. */
import type { Point } from './types'

type Branch = 'heating' | 'cooling'
type Clouds = 'on-heating' | 'on-cooling'

interface Measured {
  /** mol/L */
  x: number
  /** °C */
  y: number
  /** standard uncertainty of y, K */
  sd: number | null
  /** independent samples */
  n: number | null
  entersFit: boolean
}

interface Judged {
  limit: string
  direction: Branch
  setAside: unknown
}

/** The branch on which a solution turns cloudy: only its readings enter the fit. */
export const branchOf = (clouds: Clouds | undefined): Branch => clouds === 'on-cooling' ? 'cooling' : 'heating'

/** Whether a reading enters the fit: exact, not set aside, and measured on the branch on which the solution clouds. */
export function entersFit({ limit, direction, setAside }: Judged, clouds: Clouds | undefined): boolean {
  return limit === 'exact' && !setAside && direction === branchOf(clouds)
}

/** The points of the readings that enter a fit. */
export function pointsOf(readings: readonly Measured[]): Point[] {
  return readings.filter(one => one.entersFit).map(({ x, y, sd, n }) => ({
    x, y, ...(sd !== null && { sd }), ...(n !== null && { n }),
  }))
}
