import type { FitNote, NoteCode } from '#shared/science/fitting/types'
import { concise, plain } from '#shared/science/notation'
import type { MarginNoteText } from './marginNoteText'
import { quantitySymbol } from './quantityNames'

/** What a note's sentences are made from. */
interface Facts {
  /** a number of the note, to so many significant digits; a dash where there is none */
  number: (name: string, digits?: number) => string
  /** a number with its standard error, which stands under the same name with StandardError */
  withError: (name: string) => string
  has: (name: string) => boolean
  text: (name: string) => string
  symbol: (name: string) => string
  /** 'reading 7', or what the page calls it */
  reading: () => string
}

type Sentences = (facts: Facts) => MarginNoteText

const perM = 'M^−1^'
const slope = 'K M^−1^'

function atZero({ withError, has }: Facts): MarginNoteText {
  const determined = has('curvature') ? `, and the curvature, ${withError('curvature')} K M^−2^` : ''
  return {
    heading: 'No finite binding constant: *K* runs to zero',
    sentences: [
      'The readings bend too little to tell a weak binding with a large *B*~max~ from a weaker one with a larger.',
      `What stays determined: the initial slope, ${withError('initialSlope')} ${slope}${determined}.`,
    ],
    tag: 'no-constants',
  }
}

function atInfinity({ withError, has }: Facts): MarginNoteText {
  const step = has('Bmax')
    ? `the step *B*~max~ from the blanks to the rest, ${withError('Bmax')} K`
    : `the plateau *T*~0~ + *B*~max~, ${withError('plateau')} °C`
  return {
    heading: 'No finite binding constant: *K* runs to infinity',
    sentences: [
      'Saturation is reached before the first concentration that was measured, so the readings cannot say how soon.',
      `What stays determined: ${step}${has('c') ? `, and *c*, ${withError('c')} ${slope}` : ''}. Readings at lower concentrations would settle *K*.`,
    ],
    tag: 'no-constants',
  }
}

function weaklyDetermined({ has, number, symbol, text }: Facts): MarginNoteText {
  const reason = has('factor')
    ? `The 95 % interval of ${symbol('parameter')} spans a factor of ${number('factor', 2)}.`
    : text('parameter') ? `The 95 % interval of ${symbol('parameter')} is open on one side.` : `The constants move almost together (condition number ${number('condition', 2)}).`
  return {
    heading: text('parameter') ? `${symbol('parameter')} is weakly determined` : 'The constants are weakly determined',
    sentences: [reason, 'Quote the interval, not the value alone; more readings where the curve bends would narrow it.'],
    tag: 'not-settled',
  }
}

function fewPoints({ number, text }: Facts): MarginNoteText {
  const spare = text('degreesOfFreedom')
  return spare === '0'
    ? {
        heading: `${number('parameters')} constants from ${number('n')} readings`,
        sentences: ['The curve passes through every reading, so nothing tells how far to trust it. Each further reading helps.'],
        tag: 'no-constants',
      }
    : {
        heading: 'Few readings to spare',
        sentences: [`${number('n')} readings for ${number('parameters')} constants leave ${spare} to judge the scatter by; the intervals are wide for that reason.`],
        tag: 'not-settled',
      }
}

function lackOfFit({ has, number }: Facts): MarginNoteText {
  const reason = has('f')
    ? `The readings miss the curve by more than their repeats differ (*F* = ${number('f', 2)}, *p* = ${number('probability', 2)}).`
    : `The readings miss the curve by more than their stated uncertainties allow (χ² = ${number('chiSquare', 3)}, *p* = ${number('probability', 2)}).`
  return { heading: 'The curve misses more than noise explains', sentences: [reason, 'Another form, a shifted concentration or too small uncertainties can do that.'], tag: 'not-settled' }
}

/** Every code of the engine has its sentences here and nowhere else. */
const catalogue: Record<NoteCode, Sentences> = {
  'binding-not-identified': facts => facts.text('end') === 'infinity' ? atInfinity(facts) : atZero(facts),
  'weakly-determined': weaklyDetermined,
  'holds-as-product': ({ number, has, withError }) => ({
    heading: '*B*~max~ and *K* trade off',
    sentences: [
      has('factor') ? `The 95 % interval of *K* spans a factor of ${number('factor', 2)}.` : 'The 95 % interval of *K* is open on one side.',
      `Quote the product *B*~max~*K*, ${withError('product')} ${slope}, known to ${number('percent', 1)} %.`,
    ],
    tag: 'holds-as-product',
  }),
  'sign-of-binding-unknown': ({ number, has }) => ({
    heading: 'Binding may raise or lower the cloud point',
    sentences: [`*B*~max~ lies between ${has('lower') ? number('lower', 2) : 'no lower bound'} and ${has('upper') ? number('upper', 2) : 'no upper bound'} K at 95 %, on both sides of zero.`],
    tag: 'not-settled',
  }),
  'saturation-not-reached': ({ number }) => ({
    heading: 'Saturation is not reached',
    sentences: [`At the highest concentration, ${number('highest', 3)} M, about ${number('occupancy', 2)} % of the sites are taken. Readings beyond ${number('needed', 2)} M would pin down *B*~max~ and *K*.`],
    tag: 'not-settled',
  }),
  'low-concentrations-missing': ({ number }) => ({
    heading: 'The low concentrations are missing',
    sentences: [`The lowest, ${number('lowest', 2)} M, lies above *K*~d~, ${number('needed', 2)} M: the rise itself was not measured. Readings below ${number('needed', 2)} M decide *K*.`],
    tag: 'not-settled',
  }),
  'blank-missing': ({ number }) => ({
    heading: 'No reading without salt',
    sentences: [`*T*~0~ is extrapolated from ${number('lowest', 2)} M, and every constant leans on it. One blank of the same batch settles it.`],
    tag: 'not-settled',
  }),
  'few-points': fewPoints,
  'one-point-decides': ({ reading, number, symbol }) => ({
    heading: 'One reading decides',
    sentences: [`Without ${reading()} (${number('x', 3)} M, ${number('y', 4)} °C), ${symbol('parameter')} moves by ${number('shift', 2)} standard errors. Measure it again before quoting the constants.`],
    tag: 'not-settled',
  }),
  'pattern-in-residuals': ({ number }) => ({
    heading: 'The residuals follow a pattern',
    sentences: [`Neighbours lie on the same side too often: ${number('runs')} runs of equal sign where about ${number('expected', 2)} are expected (*p* = ${number('probability', 2)}). The form may be wrong, or the days differ.`],
    tag: 'not-settled',
  }),
  'not-normal': ({ number }) => ({
    heading: 'The residuals are not normal',
    sentences: [`The intervals assume that they are (Shapiro–Wilk *p* = ${number('probability', 2)}). Look for a reading far from the others.`],
    tag: 'not-settled',
  }),
  'lack-of-fit': lackOfFit,
  'weights-dominate': ({ number, reading }) => ({
    heading: 'A few weights carry the fit',
    sentences: [`${number('n')} readings weigh as much as ${number('effective', 2)} equal ones; ${reading()} alone has ${number('percent', 2)} % of the weight.`],
    tag: 'not-settled',
  }),
  'weights-from-few-replicates': ({ number }) => ({
    heading: 'Weights from few repeats',
    sentences: [`A standard deviation from ${number('fewest')} samples is itself uncertain, and weights made of it give intervals that are too narrow. Weigh by the number of repeats below ${number('needed')}.`],
    tag: 'not-settled',
  }),
  'resolution-floor': ({ number }) => ({
    heading: 'An uncertainty of zero was raised',
    sentences: [`No reading is exact: ${number('count')} of them count with ${number('floor', 2)} K, the resolution of the last digit.`],
  }),
  'parameter-at-bound': ({ symbol, text, number }) => ({
    heading: `${symbol('parameter')} stops at its bound`,
    sentences: [`The readings pull it beyond the ${text('side')} bound of ${number('bound', 3)}; its interval is one-sided.`],
    tag: 'not-settled',
  }),
  'not-converged': () => ({
    heading: 'The fit did not settle',
    sentences: ['The numbers shown are where it stopped, not a best fit. Other start values may help.'],
    tag: 'no-constants',
  }),
  'singular': () => ({
    heading: 'The constants cannot be told apart',
    sentences: ['Different sets of constants describe these readings equally well, so none has a standard error.'],
    tag: 'no-constants',
  }),
  'no-evidence-of-binding': ({ number, has }) => ({
    heading: 'No evidence of binding',
    sentences: [
      'A straight line describes these readings as well.',
      ...(has('detectableBmax') ? [`A *B*~max~ above about ${number('detectableBmax', 2)} K, at *K* = ${number('atK', 2)} ${perM}, would have shown.`] : []),
    ],
    tag: 'holds',
  }),
  'extrapolated': ({ symbol, number }) => ({
    heading: 'Beyond the readings',
    sentences: [`${symbol('quantity')}, ${number('value', 3)} M, lies beyond the last concentration, ${number('highest', 3)} M: it holds only if the curve goes on as fitted.`],
  }),
  'screening-region': () => ({
    heading: 'Screening can mimic binding',
    sentences: ['The chains or their ends are charged, and readings below about 0.05 M decide *K*. There, screening of charge bends the curve as binding does.'],
    tag: 'not-settled',
  }),
  'ph-not-held': () => ({
    heading: 'The pH was not held',
    sentences: ['This anion takes part in acid–base equilibria, and neither a buffer nor a measured pH is stated: the species in solution may change with concentration.'],
    tag: 'not-settled',
  }),
  'concentrations-taken-as-exact': ({ number }) => ({
    heading: 'Concentrations are taken as exact',
    sentences: [`An error of ${number('percent', 1)} % in a concentration would move a cloud point by up to ${number('effect', 2)} K, more than the scatter of ${number('s', 2)} K.`],
  }),
}

/**
 * A note of the engine in words.
 *
 * @param readingName what the page calls the engine's n-th reading, such as `row 7`
 */
export function noteSentences({ code, values }: FitNote, readingName = (place: number) => `reading ${place}`): MarginNoteText {
  const value = (name: string) => typeof values[name] === 'number' ? values[name] : null
  const text = (name: string) => values[name] === undefined || values[name] === null ? '' : String(values[name])
  return catalogue[code]({
    number: (name, digits) => plain(value(name), digits),
    withError: name => concise(value(name), value(`${name}StandardError`)),
    has: name => value(name) !== null,
    text,
    symbol: name => quantitySymbol(text(name)),
    reading: () => readingName(value('reading') ?? 0),
  })
}
