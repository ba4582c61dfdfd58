import type { Series } from '#shared/contracts/series'

type ModelName = Series['support']['models'][number]['model']

/** What each form is called beside its numbers. */
export const formNames: Record<ModelName, string> = {
  'linear': 'straight line',
  'langmuir': 'saturable binding alone',
  'linear-langmuir': 'line + saturable binding',
  'linear-quadratic': 'line + curvature',
  'linear-hill': 'line + cooperative binding',
  'expression': 'typed form',
}

export interface ModelRow {
  model: ModelName
  name: string
  scatter: number | null
  deltaAicc: number | null
  /** share of the support among the forms, 0 to 1 (Akaike weight) */
  support: number | null
  isFitted: boolean
}

/** The forms compared on the same readings, each with its share of the support. */
export function modelRows({ support, fit }: Series): ModelRow[] {
  const weights = support.models.map(({ deltaAicc }) => deltaAicc === null ? null : Math.exp(-deltaAicc / 2))
  const total = weights.reduce<number>((sum, weight) => sum + (weight ?? 0), 0)
  return support.models.map(({ model, residualStandardDeviation, deltaAicc }, index) => ({
    model,
    name: formNames[model],
    scatter: residualStandardDeviation,
    deltaAicc,
    support: weights[index] === null || total === 0 ? null : weights[index]! / total,
    isFitted: fit?.model === model,
  }))
}
