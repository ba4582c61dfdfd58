import { describe, expect, it } from 'vitest'
import { changeCampaignContract, newBatchContract } from '#shared/contracts/campaigns'
import { newInstrumentContract, newSampleContract, newStockContract } from '#shared/contracts/materials'
import { changeProjectContract } from '#shared/contracts/projects'
import { hintOf, textsOf, valuesOf, type FormField } from '~~/components/forms/fields'
import { instrumentFacts, sampleFacts, stockFacts, stockTitle } from '~~/components/forms/facts'
import { makingOf, weighingOf } from '~~/components/forms/stockMaking'
import { batchFields, campaignFields, instrumentFields, projectFields, sampleFields, stockFields } from '~~/components/forms/things'

const lab = '01890000-0000-7000-8000-0000000000a1'

describe('every form', () => {
  const forms = [
    ['sample', sampleFields, newSampleContract, {}], ['stock', stockFields, newStockContract, { lab }], ['instrument', instrumentFields, newInstrumentContract, { lab }],
    ['batch', batchFields, newBatchContract, {}], ['project', projectFields, changeProjectContract, {}], ['campaign', campaignFields([], []), changeCampaignContract, {}],
  ] as const

  /** The least that can be kept. */
  const least = (fields: readonly FormField[]) => Object.fromEntries(fields.filter(({ isNeeded }) => isNeeded).map(({ name, options }) => [name, options?.[0]?.[0] ?? 'NaCl']))

  it.each(forms)('of a %s is taken with the needed fields alone', (_, fields, contract, more) => {
    expect(contract.safeParse({ ...valuesOf(fields, least(fields)), ...more }).error).toBeUndefined()
  })

  it.each(forms)('of a %s says of each needed field that it is missing', (_, fields, contract, more) => {
    const faulty = contract.safeParse({ ...valuesOf(fields, {}), ...more }).error!.issues.map(({ path }) => path[0])
    expect(new Set(faulty)).toEqual(new Set(fields.filter(({ isNeeded }) => isNeeded).map(({ name }) => name)))
  })

  it.each(forms)('of a %s has a field for all that its contract takes, and no other', (_, fields, contract, more) => {
    const taken = Object.keys(contract.shape).filter(name => !(name in more))
    expect(fields.map(({ name }) => name).sort()).toEqual(taken.sort())
  })
})

describe('fields', () => {
  const fields: readonly FormField[] = [{ name: 'rate', label: 'Rate', kind: 'number', isForReport: true }, { name: 'name', label: 'Name', kind: 'text', isNeeded: true }]

  it('read numbers as they are typed, and leave what is none for the check', () => {
    expect(valuesOf(fields, { rate: ' 0,5 ', name: ' a ' })).toEqual({ rate: 0.5, name: 'a' })
    expect(valuesOf(fields, { rate: 'fast', name: '' })).toEqual({ rate: 'fast', name: '' })
    expect(valuesOf(fields, { rate: '' })).toEqual({ rate: null, name: '' })
  })

  it('show what stands in a thing', () => expect(textsOf(fields, { rate: 0.5, name: null })).toEqual({ rate: '0.5', name: '' }))

  it('say what may wait', () => expect(fields.map(hintOf)).toEqual(['a report states it; may wait', '']))
})

describe('a stock that is typed', () => {
  it('reads its salt however written, with the mass as bottled', () => {
    expect(makingOf({ salt: 'sodium sulphate decahydrate' })).toMatchObject({ kind: 'salt', formula: 'Na2SO4·10H2O', molarMass: '322.19' })
    expect(makingOf({ salt: 'NaClO4', hydrate: '1' })).toMatchObject({ formula: 'NaClO4·H2O', hydrate: 1 })
  })

  it('names what it does not know, and what may be meant', () => {
    expect(makingOf({ salt: 'NaSNC' })).toEqual({ kind: 'unknown', sentence: '“NaSNC” is spelt like no known salt; NaSCN was meant?' })
    expect(makingOf({ salt: 'blank' }).kind).toBe('unknown')
    expect(makingOf({ salt: ' ' }).kind).toBe('nothing')
  })

  it('gives what to weigh: 0.5 mol/L in 250 mL of the decahydrate of 99 % is 40.68 g', () => {
    // 0.5 · 0.25 · 322.19 / 0.99
    expect(weighingOf({ salt: 'Na2SO4·10H2O', purity: '0.99' }, { concentration: '0,5', volume: '250' })).toBe('40.68 g, made up to 250 mL')
    expect(weighingOf({ salt: 'Na2SO4' }, { concentration: '', volume: '250' })).toBeNull()
    expect(weighingOf({ salt: 'Na2SO4', purity: '2' }, { concentration: '1', volume: '250' })).toBeNull()
  })

  it('says what a hydrate taken as anhydrous does', () => {
    expect(makingOf({ salt: 'Na2SO4·10H2O' })).toMatchObject({ mistake: 'Weighed as if it were anhydrous, the solution is 55.9 % weaker than its label.' })
    expect(makingOf({ salt: 'Na2SO4' })).toMatchObject({ mistake: null })
  })
})

describe('facts in a line', () => {
  it('hold what is stated and nothing else', () => {
    const sample = { id: lab, name: 'sample 7', numberMeanMass: 30_000, weightMeanMass: null, dispersity: 1.2, massMethod: 'SEC', endGroups: null, tacticity: null, lot: null, openedOn: null }
    expect(sampleFacts(sample)).toBe('*M*~n~ 30000 g mol^−1^; dispersity 1.2; by SEC')
    expect(sampleFacts({ ...sample, numberMeanMass: null, dispersity: null, massMethod: null })).toBe('nothing stated yet')
    const stock = { id: lab, lab: { id: lab, name: 'Norrvik' }, salt: { formula: 'Na2SO4', name: 'sodium sulfate', anion: 'SO4^2-', cation: 'Na^+' }, hydrate: 10, lot: 'B4', purity: 0.995, madeOn: null, assay: null, relativeUncertainty: null, makeUp: null }
    expect(stockTitle(stock)).toBe('Na₂SO₄·10H₂O, lot B4, Norrvik')
    expect(stockFacts(stock)).toBe('sodium sulfate; purity 99.5 %')
    expect(instrumentFacts({ id: lab, lab: stock.lab, name: 'x', kind: 'transmittance', pathLength: 10, wavelength: 500, probePlace: null, calibratedOn: null, offset: null, offsetUncertainty: null, offsetStatedOn: null })).toBe('Norrvik; transmittance; 10 mm; 500 nm')
  })
})
