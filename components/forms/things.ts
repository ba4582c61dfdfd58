/** The forms of what a lab measures with. Which fields a report wants: common practice of turbidity work. */
import type { criteria, enthalpyBases, replicateKinds, cloudings } from '#shared/contracts/campaigns'
import type { instrumentKinds } from '#shared/contracts/materials'
import type { FormField } from './fields'

const kindWords: Record<typeof instrumentKinds[number], string> = {
  'transmittance': 'transmittance', 'absorbance': 'absorbance', 'scattering': 'scattered light', 'by-eye': 'by eye',
}
const criterionWords: Record<typeof criteria[number], string> = {
  onset: 'onset of clouding', fraction: 'a fraction of the transmittance', steepest: 'steepest point', departure: 'first departure from the baseline', sigmoid: 'midpoint of a sigmoid',
}
const cloudWords: Record<typeof cloudings[number], string> = { 'on-heating': 'on heating', 'on-cooling': 'on cooling' }
const replicateWords: Record<typeof replicateKinds[number], string> = { 'independent-samples': 'samples made up apart', 'repeat-scans': 'repeated scans of one sample' }
const basisWords: Record<typeof enthalpyBases[number], string> = { 'per-repeat-unit': 'a repeat unit', 'per-cooperative-unit': 'a cooperative unit' }

const options = <Value extends string>(words: Record<Value, string>) => Object.entries<string>(words)

export const sampleFields: readonly FormField[] = [
  { name: 'name', label: 'Name', kind: 'text', isNeeded: true, hint: 'such as: polymer sample 7' },
  { name: 'numberMeanMass', label: '*M*~n~ / g mol^−1^', kind: 'number', isForReport: true },
  { name: 'weightMeanMass', label: '*M*~w~ / g mol^−1^', kind: 'number' },
  { name: 'dispersity', label: 'Dispersity *M*~w~/*M*~n~', kind: 'number', isForReport: true },
  { name: 'massMethod', label: 'Masses found by', kind: 'text', hint: 'such as SEC, MALDI, NMR', isForReport: true },
  { name: 'endGroups', label: 'End groups', kind: 'text', isForReport: true },
  { name: 'tacticity', label: 'Tacticity', kind: 'text', isForReport: true },
  { name: 'lot', label: 'Lot', kind: 'text' },
  { name: 'openedOn', label: 'Opened on', kind: 'day' },
]

export const stockFields: readonly FormField[] = [
  { name: 'salt', label: 'Salt, with its water', kind: 'text', isNeeded: true, hint: 'formula or name, such as Na2SO4·10H2O' },
  { name: 'hydrate', label: 'Waters a formula unit', kind: 'number', hint: 'where the salt does not say it' },
  { name: 'purity', label: 'Purity as a mass fraction', kind: 'number', hint: 'such as 0.995', isForReport: true },
  { name: 'lot', label: 'Lot', kind: 'text' },
  { name: 'madeOn', label: 'Made on', kind: 'day' },
  { name: 'assay', label: 'Measured over labelled concentration', kind: 'number', hint: 'such as 0.98, where it was measured' },
  { name: 'relativeUncertainty', label: 'Relative uncertainty of the concentration', kind: 'number', hint: 'such as 0.005' },
  { name: 'makeUp', label: 'How it was made up', kind: 'long', hint: 'by volume or by mass, at which temperature', isForReport: true },
]

export const instrumentFields: readonly FormField[] = [
  { name: 'name', label: 'Name', kind: 'text', isNeeded: true },
  { name: 'kind', label: 'It measures', kind: 'choice', options: options(kindWords), isNeeded: true },
  { name: 'pathLength', label: 'Path length / mm', kind: 'number', isForReport: true },
  { name: 'wavelength', label: 'Wavelength / nm', kind: 'number', isForReport: true },
  { name: 'probePlace', label: 'Where the thermometer sits', kind: 'text', isForReport: true },
  { name: 'calibratedOn', label: 'Calibrated on', kind: 'day', isForReport: true },
  { name: 'offset', label: 'Offset, read minus true / K', kind: 'number' },
  { name: 'offsetUncertainty', label: 'Its uncertainty / K', kind: 'number' },
  { name: 'offsetStatedOn', label: 'Offset stated on', kind: 'day' },
]

export const batchFields: readonly FormField[] = [
  { name: 'label', label: 'Name', kind: 'text', isNeeded: true, hint: 'such as: 4 March' },
  { name: 'measuredOn', label: 'Measured on', kind: 'day' },
  { name: 'referenceCheck', label: 'Reference sample in this run / °C', kind: 'number' },
  { name: 'note', label: 'Note', kind: 'long' },
]

export const projectFields: readonly FormField[] = [
  { name: 'name', label: 'Name', kind: 'text', isNeeded: true },
  { name: 'question', label: 'What it wants to know', kind: 'long' },
]

type Choices = readonly (readonly [string, string])[]

/** A campaign's conditions, with the samples and instruments there are to choose from. */
export function campaignFields(samples: Choices, instruments: Choices): readonly FormField[] {
  return [
    { name: 'name', label: 'Name', kind: 'text', isNeeded: true, hint: 'such as: spring' },
    { name: 'clouds', label: 'The solution turns cloudy', kind: 'choice', options: options(cloudWords), isNeeded: true, hint: 'fixed once there are readings' },
    { name: 'sample', label: 'Sample', kind: 'choice', options: samples, isForReport: true },
    { name: 'polymerConcentration', label: 'Polymer concentration / g L^−1^', kind: 'number', isForReport: true },
    { name: 'solvent', label: 'Solvent', kind: 'text', isNeeded: true },
    { name: 'buffer', label: 'Buffer', kind: 'text', hint: 'its ions stay outside the varied concentration' },
    { name: 'ph', label: 'pH', kind: 'number', isForReport: true },
    { name: 'instrument', label: 'Instrument', kind: 'choice', options: instruments, isForReport: true },
    { name: 'criterion', label: 'Cloud point read as', kind: 'choice', options: options(criterionWords), isForReport: true },
    { name: 'criterionFraction', label: 'Fraction of the transmittance', kind: 'number', hint: 'such as 0.5, with that criterion' },
    { name: 'rate', label: 'Rate / K min^−1^', kind: 'number', isForReport: true },
    { name: 'hold', label: 'Held before a ramp / min', kind: 'number', isForReport: true },
    { name: 'replicateKind', label: 'A replicate is', kind: 'choice', options: options(replicateWords), isForReport: true },
    { name: 'transitionEnthalpy', label: 'Transition enthalpy / kJ mol^−1^', kind: 'number', hint: 'with its basis' },
    { name: 'transitionEnthalpyBasis', label: 'Enthalpy for', kind: 'choice', options: options(basisWords) },
    { name: 'startedOn', label: 'Started on', kind: 'day' },
  ]
}
