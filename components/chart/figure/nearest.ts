import type { Frame } from './frame'
import type { FigureReading } from './types'

/** Sideways distance counts more: a read-out follows the column under the pointer. */
const sideways = 3

/** The index of the reading nearest to a place in the figure [px]; −1 without readings. */
export function nearestReading(readings: readonly FigureReading[], frame: Frame, x: number, y: number): number {
  const distance = (reading: FigureReading) => Math.hypot(sideways * (frame.x(reading.x) - x), frame.y(reading.y) - y)
  return readings.reduce((best, reading, index) => {
    const nearest = readings[best]
    return nearest === undefined || distance(reading) < distance(nearest) ? index : best
  }, readings.length > 0 ? 0 : -1)
}
