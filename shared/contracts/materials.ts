import { z } from 'zod'
import { id, named } from './common'
import { day, later, laterText, number, positive, requiredText, text } from './forms'

export const massMethods = ['SEC', 'MALDI', 'NMR', 'light-scattering', 'sequence', 'maker'] as const

/** The polymer, polypeptide or protein. Masses in g/mol. */
export const newSampleContract = z.strictObject({
  name: requiredText(120),
  numberMeanMass: later(positive).describe('Mn, g/mol'),
  weightMeanMass: later(positive).describe('Mw, g/mol'),
  dispersity: later(number.min(1, 'must be 1 or more')).describe('Mw/Mn'),
  massMethod: later(text(80)).describe(`how the masses were found, such as ${massMethods.join(', ')}`),
  endGroups: laterText(200),
  tacticity: later(text(80)),
  lot: laterText(80),
  openedOn: later(day),
})
export const sampleContract = z.object({
  id, name: z.string(), numberMeanMass: z.number().nullable(), weightMeanMass: z.number().nullable(), dispersity: z.number().nullable(),
  massMethod: z.string().nullable(), endGroups: z.string().nullable(), tacticity: z.string().nullable(), lot: z.string().nullable(), openedOn: z.iso.date().nullable(),
})
export type Sample = z.infer<typeof sampleContract>

/** A salt solution as made. The salt however written; hydrate as waters a formula unit; purity and assay as fractions. */
export const newStockContract = z.strictObject({
  lab: id,
  salt: requiredText(120).describe('formula or name, with its hydrate, such as Na2SO4·10H2O'),
  hydrate: later(number.min(0, 'must be 0 or more').max(30, 'must be at most 30')).describe('waters a formula unit, where the salt does not say it'),
  lot: laterText(80),
  purity: later(positive.max(1, 'must be at most 1')).describe('mass fraction'),
  madeOn: later(day),
  assay: later(positive).describe('measured concentration over the labelled one'),
  relativeUncertainty: later(number.min(0, 'must be 0 or more').max(1, 'must be at most 1')).describe('relative standard uncertainty of the concentration'),
  makeUp: laterText(300).describe('how it was made up: by volume or by mass, at which temperature'),
})
export const stockContract = z.object({
  id, lab: named, salt: z.object({ formula: z.string(), name: z.string(), anion: z.string(), cation: z.string() }), hydrate: z.number(), lot: z.string().nullable(),
  purity: z.number().nullable(), madeOn: z.iso.date().nullable(), assay: z.number().nullable(), relativeUncertainty: z.number().nullable(), makeUp: z.string().nullable(),
})
export type Stock = z.infer<typeof stockContract>

export const instrumentKinds = ['transmittance', 'absorbance', 'scattering', 'by-eye'] as const
export const newInstrumentContract = z.strictObject({
  lab: id,
  name: requiredText(120),
  kind: z.enum(instrumentKinds, 'must be chosen'),
  pathLength: later(positive).describe('mm'),
  wavelength: later(positive).describe('nm'),
  probePlace: laterText(200).describe('where the thermometer sits'),
  calibratedOn: later(day),
  offset: later(number).describe('read minus true, K'),
  offsetUncertainty: later(number.min(0, 'must be 0 or more')).describe('K'),
  offsetStatedOn: later(day),
})
export const instrumentContract = z.object({
  id, lab: named, name: z.string(), kind: z.enum(instrumentKinds), pathLength: z.number().nullable(), wavelength: z.number().nullable(), probePlace: z.string().nullable(),
  calibratedOn: z.iso.date().nullable(), offset: z.number().nullable(), offsetUncertainty: z.number().nullable(), offsetStatedOn: z.iso.date().nullable(),
})
export type Instrument = z.infer<typeof instrumentContract>

/** What a project has to choose from in its forms. */
export const materialsContract = z.object({ samples: z.array(sampleContract), stocks: z.array(stockContract), instruments: z.array(instrumentContract) })
export type Materials = z.infer<typeof materialsContract>
export const sampleParams = z.object({ sample: id })
export const stockParams = z.object({ stock: id })
export const instrumentParams = z.object({ instrument: id })
