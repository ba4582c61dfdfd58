import type { ModelName } from '../fitting/types'
import { langmuir } from './langmuir'
import { linear } from './linear'
import { linearHill } from './linear-hill'
import { linearLangmuir } from './linear-langmuir'
import { linearQuadratic } from './linear-quadratic'
import type { Model } from './model'

export type { DerivedValue, Model, ParameterDefinition } from './model'

/** Every model by its name. */
export const models: Readonly<Record<ModelName, Model>> = {
  'linear': linear,
  'langmuir': langmuir,
  'linear-langmuir': linearLangmuir,
  'linear-quadratic': linearQuadratic,
  'linear-hill': linearHill,
}
