/** What ties and blanks must satisfy before anything is fitted. */
import { checkNamed, checkReadings, collect, type Report } from '../fitting/check'
import { ScienceError } from '../errors'
import { modelNames } from '../fitting/types'
import { models } from '../models'
import type { SharedRequest, SharedSeries, Tie } from './types'

/** @throws ScienceError 'unusable-input' with every problem */
export function checkShared(request: SharedRequest): void {
  const problems = collect((report) => {
    if (request.series.length === 0) report('series', 'must hold at least one series')
    checkSeries(request, report)
    request.ties.forEach((tie, t) => checkTie(tie, request.series, `ties.${t}`, report))
    checkOverlaps(request.ties, report)
    checkBlanks(request, report)
  })
  if (problems.length > 0) throw new ScienceError('unusable-input', problems)
}

function checkSeries({ series, weighting, sdMeaning, ties }: SharedRequest, report: Report): void {
  series.forEach(({ id, model, points, parameters }, s) => {
    const inSeries: Report = (path, message) => report(`series.${s}.${path}`, message)
    if (series.findIndex(other => other.id === id) !== s) inSeries('id', 'must be its own: two series of one id')
    // A tied constant is found with the others' help: the series' own readings need not be enough for it.
    const tied = ties.filter(tie => tie.series.includes(id)).map(({ parameter }) => [parameter, { fixed: 1 }] as const)
    const own = { model, points, parameters: { ...parameters, ...Object.fromEntries(tied) }, weighting, sdMeaning }
    checkReadings(own, inSeries)
    checkNamed(own, inSeries)
  })
}

function checkTie({ parameter, series: ids }: Tie, all: readonly SharedSeries[], path: string, report: Report): void {
  if (new Set(ids).size < 2) report(`${path}.series`, 'must name at least two series')
  for (const id of ids) {
    const found = all.find(one => one.id === id)
    if (!found) report(`${path}.series`, `there is no series ${id}`)
    else if (modelNames.includes(found.model) && !models[found.model].parameters.some(({ name }) => name === parameter)) report(`${path}.parameter`, `the model of series ${id} has no ${parameter}`)
    else if (found.parameters?.[parameter]) report(`${path}.parameter`, `${parameter} of series ${id} is held or bounded and tied at once; choose one`)
  }
}

function checkOverlaps(ties: readonly Tie[], report: Report): void {
  ties.forEach(({ parameter, series }, t) => {
    const before = ties.slice(0, t).filter(tie => tie.parameter === parameter).flatMap(tie => tie.series)
    const twice = series.filter(id => before.includes(id))
    if (twice.length > 0) report(`ties.${t}.series`, `${parameter} of ${twice.join(', ')} is tied twice; join the ties`)
  })
}

function checkBlanks({ blanks = [], ties }: SharedRequest, report: Report): void {
  blanks.forEach(({ points, series }, b) => {
    points.forEach(({ x }, i) => {
      if (x !== 0) report(`blanks.${b}.points.${i}.x`, 'must be 0: a blank holds no salt')
    })
    if (!ties.some(tie => tie.parameter === 'T0' && series.every(id => tie.series.includes(id)))) {
      report(`blanks.${b}.series`, 'must be series that share one T0; otherwise blanks are readings of each series')
    }
  })
}
