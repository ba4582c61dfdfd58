/** Fitting of the named models; runs in the browser and on the server. Expressions have their own entry, ./expression. */
export { bandAt, curveAt, hasCovarianceRow, type Band, type DrawableFit } from './curve'
export { compareModels, supportOf, type ModelComparison, type ModelSupport, type Support, type Verdict } from './compare'
export { choiceFaults, fitAsChosen, fitOrNone, usualOptions, type ChosenFit } from './chosen'
export { fit } from './fit'
export { branchOf, entersFit, pointsOf } from './points'
export type * from './types'
