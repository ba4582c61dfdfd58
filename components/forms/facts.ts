/** What is known of samples, stocks and instruments, in a line. */
import type { Instrument, Sample, Stock } from '#shared/contracts/materials'
import { hydrateFormula } from '#shared/science/chemistry/read-salt'
import { plainFormula } from '#shared/science/chemistry/ions'
import { plain } from '#shared/science/notation'

type Fact = string | false | null | undefined
const line = (...facts: Fact[]) => facts.filter(Boolean).join('; ') || 'nothing stated yet'
const given = <Value>(value: Value | null, words: (value: Value) => string): Fact => value !== null && words(value)

export const sampleFacts = ({ numberMeanMass, weightMeanMass, dispersity, massMethod, endGroups, tacticity, lot }: Sample) => line(
  given(numberMeanMass, mass => `*M*~n~ ${plain(mass)} g mol^−1^`), given(weightMeanMass, mass => `*M*~w~ ${plain(mass)} g mol^−1^`),
  given(dispersity, value => `dispersity ${plain(value)}`), given(massMethod, by => `by ${by}`), given(endGroups, groups => `end groups ${groups}`),
  tacticity, given(lot, name => `lot ${name}`),
)

export const stockTitle = ({ salt, hydrate, lot, lab }: Stock) => `${plainFormula(hydrateFormula(salt.formula, hydrate))}${lot ? `, lot ${lot}` : ''}, ${lab.name}`

export const stockFacts = ({ salt, purity, madeOn, assay, relativeUncertainty, makeUp }: Stock) => line(
  salt.name, given(purity, share => `purity ${plain(share * 100)} %`), given(madeOn, day => `made on ${day}`),
  given(assay, ratio => `measured ${plain(ratio)} of the label`), given(relativeUncertainty, share => `concentration known to ${plain(share * 100)} %`), makeUp,
)

export const instrumentFacts = ({ lab, kind, pathLength, wavelength, probePlace, calibratedOn, offset }: Instrument) => line(
  lab.name, kind, given(pathLength, length => `${plain(length)} mm`), given(wavelength, length => `${plain(length)} nm`),
  given(probePlace, place => `thermometer ${place}`), given(calibratedOn, day => `calibrated on ${day}`), given(offset, value => `reads ${plain(value)} K off`),
)
