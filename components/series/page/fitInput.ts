import type { Series } from '#shared/contracts/series'
import { pointsOf } from '#shared/science/fitting'
import type { NamedRequest } from '#shared/science/fitting/types'

export type SeriesReading = Series['readings'][number]

/** The readings behind the fit. */
export function usedReadings({ readings }: Series): SeriesReading[] {
  return readings.filter(reading => reading.entersFit)
}

/** The request that gives the series' current fit again; null without a fit of a named model. */
export function fitRequest(series: Series, readings = usedReadings(series)): NamedRequest | null {
  const { fit } = series
  if (!fit || fit.model === 'expression') return null
  return {
    model: fit.model,
    weighting: fit.weighting,
    sdMeaning: fit.sdMeaning,
    points: pointsOf(readings.map(reading => ({ ...reading, entersFit: true }))),
  }
}

/** The constant that matters most of a model: K where it binds, else the slope. */
export function leadingConstant(series: Series) {
  const parameters = series.fit?.parameters ?? []
  const leading = parameters.find(({ name }) => name === 'K') ?? parameters.find(({ name }) => name === 'c')
  return leading && leading.estimate !== null && leading.standardError !== null
    ? { name: leading.name, unit: leading.unit, estimate: leading.estimate, standardError: leading.standardError }
    : null
}
