import type { Series } from '#shared/contracts/series'
import type { FigureReading } from '~~/components/chart/figure/types'
import { keysOf } from './readingRows'

/** The readings of a series as its figure draws them. */
export function figureReadings({ readings }: Series): FigureReading[] {
  const keys = keysOf(readings)
  return readings.map(reading => ({
    ...reading,
    setAside: reading.setAside !== null,
    apart: !reading.entersFit && !reading.setAside && reading.limit === 'exact',
    key: keys.get(reading.number),
  }))
}
