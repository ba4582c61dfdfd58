import { curveAt, type DrawableFit } from '../fitting'
import { concentrationScale, type ShiftCurve } from './concentration-scale'

/** One series among those of other labs. */
export interface ComparedSeries {
  id: string
  lab: string
  campaign: string
  ion: string
  fit: DrawableFit | null
  /** readings with salt, set aside or not */
  measured: number
  hasBlank: boolean
  /** highest concentration [mol/L] */
  reach: number
  /** months from making the stock to its use */
  stockAge: number | null
}

/** What stands out when labs are laid side by side: a code and its values; the sentence is the client's. */
export type Finding
  = | { code: 'concentration-scale', lab: string, ion: string, scale: number, series: string[], stockAge: number | null, isOnlySalt: boolean }
    | { code: 'offset', lab: string, offset: number, series: number }
    | { code: 'empty-places', tooFew: EmptyPlace[], notMeasured: EmptyPlace[] }

export interface EmptyPlace {
  lab: string
  campaign: string
  ion: string
  measured: number
}

/** Factor on concentration, both ways, below which stocks are taken as alike; our choice, well above the 1 to 2 % of weighing. */
const alikeWithin = Math.log(1.08)
/** Offset between labs worth a sentence [K]; our choice, above what a calibrated thermometer leaves open. */
const smallestOffset = 0.2

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length
const distinct = (values: readonly string[]) => [...new Set(values)]

export function findingsOf(series: readonly ComparedSeries[]): Finding[] {
  return [...scaleFindings(series), ...offsetFindings(series), ...emptyFindings(series)]
}

/** Why a series needs a look. */
export type Attention = 'concentration-low' | 'concentration-high' | 'no-blank'

/** The series that need a look before anyone quotes them. */
export function attentionOf(series: readonly ComparedSeries[], findings: readonly Finding[]): Map<string, Attention> {
  const attention = new Map<string, Attention>()
  for (const one of series) if (one.measured > 0 && !one.hasBlank) attention.set(one.id, 'no-blank')
  for (const finding of findings) {
    if (finding.code !== 'concentration-scale') continue
    for (const id of finding.series) attention.set(id, finding.scale < 1 ? 'concentration-low' : 'concentration-high')
  }
  return attention
}

function meanShift(series: readonly ComparedSeries[]): ShiftCurve {
  return x => mean(series.flatMap(({ fit }) => {
    const curve = fit && curveAt(fit, [0, x])
    return curve ? [curve[1]! - curve[0]!] : []
  }))
}

/** Logarithms of the scale of one series against each other lab that measured the same anion. */
function scalesAgainstOthers(one: ComparedSeries, sameIon: readonly ComparedSeries[]): number[] {
  const others = distinct(sameIon.map(({ lab }) => lab)).filter(lab => lab !== one.lab)
  return others.map(lab => Math.log(concentrationScale(meanShift([one]), meanShift(sameIon.filter(other => other.lab === lab)), one.reach)))
}

function scaleFindings(series: readonly ComparedSeries[]) {
  const fitted = series.filter(({ fit }) => fit && curveAt(fit, [0]))
  const suspects = distinct(fitted.map(({ lab }) => lab)).flatMap(lab => distinct(fitted.map(({ ion }) => ion)).flatMap((ion) => {
    const sameIon = fitted.filter(one => one.ion === ion)
    const own = sameIon.filter(one => one.lab === lab)
    const scales = own.map(one => scalesAgainstOthers(one, sameIon))
    // One other lab could be the one that is wrong: it takes two that agree.
    const isApart = own.length > 0 && scales.every(logs => logs.length > 1 && (logs.every(log => log > alikeWithin) || logs.every(log => log < -alikeWithin)))
    return isApart ? [{ lab, ion, scale: Math.exp(mean(scales.flat())), series: own.map(({ id }) => id), stockAge: own[0]!.stockAge }] : []
  }))
  return suspects.map(suspect => ({
    code: 'concentration-scale' as const,
    ...suspect,
    isOnlySalt: suspects.filter(({ lab }) => lab === suspect.lab).length === 1,
  }))
}

function offsetFindings(series: readonly ComparedSeries[]) {
  const levels = series.flatMap(({ lab, fit, hasBlank }) => {
    const curve = hasBlank && fit ? curveAt(fit, [0]) : null
    return curve ? [{ lab, level: curve[0]! }] : []
  })
  const labs = distinct(levels.map(({ lab }) => lab))
  if (labs.length < 3) return []
  const meanOf = (chosen: string) => mean(levels.filter(({ lab }) => lab === chosen).map(({ level }) => level))
  return labs.flatMap((lab) => {
    const others = mean(labs.filter(other => other !== lab).map(meanOf))
    const own = levels.filter(one => one.lab === lab)
    const offset = meanOf(lab) - others
    const isInAll = own.every(({ level }) => (level - others) * offset > 0)
    const isFurthest = labs.every(other => other === lab || Math.abs(meanOf(other) - others) < Math.abs(offset) / 2)
    return Math.abs(offset) >= smallestOffset && isInAll && isFurthest ? [{ code: 'offset' as const, lab, offset, series: own.length }] : []
  })
}

function emptyFindings(series: readonly ComparedSeries[]) {
  const places = series.filter(({ fit }) => !fit).map(({ lab, campaign, ion, measured }) => ({ lab, campaign, ion, measured }))
  const tooFew = places.filter(({ measured }) => measured > 0)
  const notMeasured = places.filter(({ measured }) => measured === 0)
  return places.length > 0 ? [{ code: 'empty-places' as const, tooFew, notMeasured }] : []
}
