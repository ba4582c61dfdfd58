import { anionOf, plainFormula } from '#shared/science/chemistry/ions'
import type { EmptyPlace, Finding } from '#shared/science/pooling/findings'
import type { MarginNoteText } from '~~/components/ui/marginNoteText'
import { capitalized, counted, inWords, listed } from './words'

const nameOf = (ion: string) => anionOf(ion)?.name ?? ion

type Of<Code extends Finding['code']> = Extract<Finding, { code: Code }>

function scaleNote({ lab, ion, scale, series, stockAge, isOnlySalt }: Of<'concentration-scale'>): MarginNoteText {
  const runs = series.length === 2 ? 'Both campaigns run' : series.length === 1 ? 'Its campaign runs' : `All ${inWords(series.length)} campaigns run`
  const others = isOnlySalt ? `; no other salt of ${lab} does` : ''
  const age = stockAge === null ? '' : ` Its stock was ${counted(Math.round(stockAge), 'month')} old when first used, by the stock record.`
  const sentences = [`${runs} as if every concentration were ${scale.toFixed(2)} of the label${others}.${age}`]
  return { heading: `${lab}’s ${nameOf(ion)} stands apart`, sentences, tag: 'holds-as-product', tagLabel: `${capitalized(inWords(series.length))} series to look at` }
}

function offsetNote({ lab, offset, series }: Of<'offset'>): MarginNoteText {
  return {
    heading: `${lab} starts ${Math.abs(offset).toFixed(1)} K ${offset > 0 ? 'higher' : 'lower'}`,
    sentences: [`In all its ${series} fitted series, also without salt. Thermometer, lag, polymer lot or criterion could do this; shifts are not touched.`],
    tag: 'not-settled',
    tagLabel: 'Offset holds, cause not settled',
  }
}

const placeOf = ({ lab, campaign }: EmptyPlace) => `${lab}, ${campaign},`

function emptyNote({ tooFew, notMeasured }: Of<'empty-places'>): MarginNoteText {
  const count = tooFew.length + notMeasured.length
  const few = tooFew.map(place => `${placeOf(place)} has ${counted(place.measured, 'reading')} of ${plainFormula(place.ion)}: too few for a fit.`)
  const campaigns = [...new Set(notMeasured.map(({ lab, campaign }) => `${lab}\n${campaign}`))]
  const missing = campaigns.map((key) => {
    const [lab, campaign] = key.split('\n')
    const ions = notMeasured.filter(place => place.lab === lab && place.campaign === campaign).map(({ ion }) => plainFormula(ion))
    return `${lab} has not measured ${listed(ions)} in ${campaign}.`
  })
  return {
    heading: count === 1 ? 'One place is empty' : `${capitalized(inWords(count))} places are empty`,
    sentences: [[...few, ...missing].join(' ')],
    tag: 'no-constants',
  }
}

/** The sentence for each finding; the one catalogue of the series page. */
export function findingNote(finding: Finding): MarginNoteText {
  switch (finding.code) {
    case 'concentration-scale': return scaleNote(finding)
    case 'offset': return offsetNote(finding)
    case 'empty-places': return emptyNote(finding)
  }
}
