import { describe, expect, it } from 'vitest'
import { headerText } from '#shared/tables/columns/header-text'
import { directionOf, isDoubt, isSummaryWord, meaningOf, uncertaintyWordOf } from '#shared/tables/columns/header-words'
import { fold } from '#shared/tables/cells/fold'
import { unitOf } from '#shared/tables/cells/units'

describe('headerText', () => {
  it.each([
    ['c / mol L-1', 'c', 'mol/L'], ['c/M', 'c', 'mol/L'], ['conc (mM)', 'conc', 'mmol/L'], ['conc [mol/kg]', 'conc', 'mol/kg'], ['Konzentration in mol/l', 'konzentration', 'mol/L'],
    ['conc, mM', 'conc', 'mmol/L'], ['conc_M', 'conc', 'mol/L'], ['mM', '', 'mmol/L'], ['M', '', 'mol/L'], ['T_cp / °C', 't cp', '°C'], ['T (K)', 't', 'K'], ['Temp. °C', 'temp', '°C'],
    ['Trübungspunkt (°C)', 'trubungspunkt', '°C'], ['cloud point (deg C)', 'cloud point', '°C'], ['rate (K/min)', 'rate', 'K/min'], ['c (mol·dm⁻³)', 'c', 'mol/L'],
  ])('cuts %s into name and unit', (header, name, unit) => {
    expect(headerText(header)).toEqual({ name, unit: expect.objectContaining({ name: unit }) })
  })

  it.each(['T1', 'c', 'K', 'salt', 'T (heating)', 'c(NaCl)', 'u(T)'])('finds no unit in %s', (header) => {
    expect(headerText(header).unit).toBeNull()
  })
})

describe('meaningOf', () => {
  it.each([
    ['concentration', ['concentration', 'conc', 'c', 'c(NaCl)', '[NaCl]', 'Konzentration', 'Salzkonzentration', 'konsentrasjon', 'concentración', 'molality', 'Molarität', 'salt conc.']],
    ['cloud-point', ['cloud point', 'Tcp', 'T_cp', 'T', 'T1', 'CP', 'LCST', 'Trübungspunkt', 'Trübungstemperatur', 'uklarhetspunkt', 'point de trouble', 'température de trouble', 'punto de turbidez', 'Temperatur', 'Tcloud', 'temp.']],
    ['salt', ['salt', 'Salz', 'sel', 'sal', 'anion', 'salt name', 'compound', 'electrolyte']],
    ['uncertainty', ['±', '+/-', 'u', 'sd', 'SD', 's', 'std', 'stdev', 'StdAbw', 'Standardabweichung', 'SE', 'SEM', 'error', 'err', 'Fehler', 'Unsicherheit', 'u(T)', 'T error', 'écart-type', 'incertitude', 'incertidumbre', 'desviación estándar', 'usikkerhet', 'standardavvik', 'sd heating']],
    ['samples', ['n', 'samples', 'replicates', 'number of samples', 'Anzahl', 'antall', 'nombre de mesures']],
    ['replicate', ['replicate', 'rep', 'Wiederholung', 'parallell', 'essai']],
    ['batch', ['batch', 'Charge', 'run', 'series', 'lot']],
    ['date', ['date', 'Datum', 'dato', 'fecha', 'measured on', 'measured', 'gemessen am', 'målt']],
    ['direction', ['direction', 'Richtung', 'retning', 'heating/cooling']],
    ['rate', ['rate', 'heating rate', 'Heizrate', 'vitesse']],
    ['pH', ['pH', 'pH value']],
    ['note', ['note', 'remarks', 'Bemerkung', 'Anmerkung', 'Kommentar', 'merknad', 'remarque', 'observaciones']],
    ['set-aside', ['set aside because', 'excluded', 'ausgeschlossen']],
    ['kept', ['polymer concentration', 'Polymerkonzentration', 'No.', 'transmittance', 'mass of salt', 'stock conc.', 'time', 'temps']],
  ])('knows headings for %s', (meaning, headings) => {
    expect(headings.map(heading => [heading, meaningOf(headerText(heading).name)])).toEqual(headings.map(heading => [heading, meaning]))
  })

  it.each(['operator X', 'colour', 'x1', ''])('does not guess at “%s”', (heading) => {
    expect(meaningOf(headerText(heading).name)).toBeNull()
  })
})

describe('words', () => {
  it.each([['sd', 'sd-of-replicates'], ['std', 'sd-of-replicates'], ['stdabw', 'sd-of-replicates'], ['s', 'sd-of-replicates'], ['u', 'standard-uncertainty'], ['se', 'standard-uncertainty'], ['unsicherheit', 'standard-uncertainty']])('take %s for %s, as an assumption', (name, meaning) => {
    expect(uncertaintyWordOf(name)).toEqual({ meaning, isCertain: false })
  })
  it('leave no doubt about “standard uncertainty” alone, and none in “error” or “±”', () => {
    expect(uncertaintyWordOf('standard uncertainty')).toMatchObject({ isCertain: true })
    expect(['error', '±', '+/-', 'err'].map(uncertaintyWordOf)).toEqual([null, null, null, null])
  })
  it.each([['up', 'heating'], ['Tcp dn', 'cooling'], ['Abkühlen', 'cooling'], ['Aufheizen', 'heating'], ['oppvarming', 'heating'], ['refroidissement', 'cooling'], ['calentamiento', 'heating'], ['salt', null]])('read the direction of %s', (word, direction) => {
    expect(directionOf(fold(word))).toBe(direction)
  })
  it.each(['mean', 'Mittelwert:', 'average', 'moyenne', 'gjennomsnitt', 'promedio', 'Summe', 'SD', 'mean ± sd'])('know %s for the label of a summary', (word) => {
    expect(isSummaryWord(fold(word))).toBe(true)
  })
  it.each(['meaningless', 'NaCl', 'sumatriptan', 'blank'])('do not take %s for one', (word) => {
    expect(isSummaryWord(fold(word))).toBe(false)
  })
  it.each([['bubble?', true], ['Ausreißer', true], ['new cell', false]])('hear doubt in “%s”: %s', (remark, isDoubtful) => {
    expect(isDoubt(fold(remark))).toBe(isDoubtful)
  })
})

describe('unitOf', () => {
  it.each(['mol/L', 'mol l-1', 'mol·L⁻¹', 'mol dm-3', 'M', 'molar'])('knows %s for mol/L', unit => expect(unitOf(unit)?.name).toBe('mol/L'))
  it.each(['µM', 'g/L', 'mm2', 'Ks', ''])('does not know “%s”', unit => expect(unitOf(unit)).toBeNull())
  it('tells molar from molal', () => expect([unitOf('M')?.name, unitOf('m')?.name]).toEqual(['mol/L', 'mol/kg']))
})
