import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { plainFormula } from '#shared/science/chemistry/ions'
import { ionPairs } from '#shared/science/chemistry/ion-lookup'
import { hydrateFormula, readSalt } from '#shared/science/chemistry/read-salt'
import { saltFrom } from '#shared/science/chemistry/salts'

/** What a text is read as, in one word. */
function reading(text: string): string {
  const read = readSalt(text)
  if (read.kind === 'salt') return hydrateFormula(read.salt.formula, read.hydrate)
  return read.kind === 'blank' ? 'blank' : `${read.problem}: ${read.suggestion ?? 'no suggestion'}`
}

describe('readSalt', () => {
  it.each([
    ['Na2SO4', 'Na2SO4'], ['Na₂SO₄', 'Na2SO4'], ['Na$_2$SO$_4$', 'Na2SO4'], ['Na<sub>2</sub>SO<sub>4</sub>', 'Na2SO4'], ['  Na2SO4. ', 'Na2SO4'],
    ['NACL', 'NaCl'], ['nascn', 'NaSCN'], ['Nacl', 'NaCl'], ['cocl2', 'CoCl2'],
    ['(NH4)2SO4', '(NH4)2SO4'], ['[NH4]2SO4', '(NH4)2SO4'], ['Ca(SCN)2', 'Ca(SCN)2'], ['Al2(SO4)3', 'Al2(SO4)3'], ['K4[Fe(CN)6]', 'K4Fe(CN)6'],
    ['KNCS', 'KSCN'], ['CH3COONa', 'NaCH3CO2'], ['NaOAc', 'NaCH3CO2'], ['HCOONa', 'NaHCO2'], ['NaCHO2', 'NaHCO2'], ['NaBPh4', 'NaB(C6H5)4'],
    ['N(CH3)4Cl', 'N(CH3)4Cl'], ['Me4NCl', 'N(CH3)4Cl'], ['GdmSCN', 'C(NH2)3SCN'], ['GuHCl', 'C(NH2)3Cl'],
    ['Na+ SCN-', 'NaSCN'], ['Na⁺SCN⁻', 'NaSCN'], ['Na+ ClO4-', 'NaClO4'], ['Na2^+SO4^2-', 'Na2SO4'], ['NaCl (aq)', 'NaCl'], ['“NaCl”*', 'NaCl'],
  ])('takes the formula %s as %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    ['sodium sulfate', 'Na2SO4'], ['Sodium Sulphate', 'Na2SO4'], ['disodium sulfate', 'Na2SO4'], ['sodium sulfate, anhydrous', 'Na2SO4'], ['ammonium sulphate', '(NH4)2SO4'],
    ['sodium thiocyanate', 'NaSCN'], ['sodium rhodanide', 'NaSCN'], ['potassium thio cyanate', 'KSCN'], ['calcium dichloride', 'CaCl2'], ['cesium chloride', 'CsCl'],
    ['guanidine hydrochloride', 'C(NH2)3Cl'], ['tetramethylammonium chloride', 'N(CH3)4Cl'], ['copper(II) chloride', 'CuCl2'], ['copper(I) chloride', 'CuCl'], ['potassium ferricyanide', 'K3Fe(CN)6'],
    ['sodium bicarbonate', 'NaHCO3'], ['sodium sulfate (Na2SO4)', 'Na2SO4'], ['table salt', 'NaCl'], ['iron (III) chloride (FeCl3)', 'FeCl3'],
  ])('takes the English name %s as %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    ['Na sulfate', 'Na2SO4'], ['Na3citrate', 'Na3C6H5O7'], ['K-thiocyanate', 'KSCN'], ['sodium SCN', 'NaSCN'], ['NaAc', 'NaCH3CO2'], ['MgAc2', 'Mg(CH3CO2)2'],
  ])('takes %s, half formula and half name or short, as %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    ['NaCl p.a.', 'NaCl'], ['Natriumchlorid p. a.', 'NaCl'], ['sodium chloride (≥ 99.5 %)', 'NaCl'], ['Sodium Chloride, ACS', 'NaCl'], ['NaCl 5 %', 'unknown: no suggestion'],
  ])('looks past the grade of %s, but not past a content: %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    ['Natriumsulfat', 'Na2SO4'], ['Natriumchlorid', 'NaCl'], ['Natriumrhodanid', 'NaSCN'], ['Kaliumiodid', 'KI'], ['Kaliumjodid', 'KI'], ['Ammoniumsulfat', '(NH4)2SO4'], ['Natrium-Thiocyanat', 'NaSCN'], ['Cäsiumchlorid', 'CsCl'], ['Kochsalz', 'NaCl'],
    ['sulfate de sodium', 'Na2SO4'], ['chlorure de sodium', 'NaCl'], ['thiocyanate de sodium', 'NaSCN'], ['sulfate d’ammonium', '(NH4)2SO4'], ['hydrogénophosphate de disodium', 'Na2HPO4'], ['chlorure de césium', 'CsCl'],
    ['natriumsulfat', 'Na2SO4'], ['natriumklorid', 'NaCl'], ['natriumtiocyanat', 'NaSCN'], ['kaliumjodid', 'KI'], ['natriumkarbonat', 'Na2CO3'], ['natriumperklorat', 'NaClO4'],
    ['sulfato de sodio', 'Na2SO4'], ['cloruro de sodio', 'NaCl'], ['tiocianato de sodio', 'NaSCN'], ['yoduro de potasio', 'KI'], ['perclorato de sodio', 'NaClO4'], ['cloruro di sodio', 'NaCl'],
  ])('takes the German, French, Norwegian, Spanish or Italian name %s as %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    ['NaClO4·H2O', 'NaClO4·H2O'], ['NaClO4.H2O', 'NaClO4·H2O'], ['NaClO4*H2O', 'NaClO4·H2O'], ['NaClO4 x H2O', 'NaClO4·H2O'], ['Na2SO4 x 10 H2O', 'Na2SO4·10H2O'], ['Na2SO4×10H2O', 'Na2SO4·10H2O'],
    ['MgCl2 6H2O', 'MgCl2·6H2O'], ['CuSO4.5H2O', 'CuSO4·5H2O'], ['CaCl2 dihydrate', 'CaCl2·2H2O'], ['Na2SO4·0.5H2O', 'Na2SO4·0.5H2O'],
    ['sodium sulfate decahydrate', 'Na2SO4·10H2O'], ['sodium phosphate dibasic dodecahydrate', 'Na2HPO4·12H2O'], ['Natriumsulfat-Decahydrat', 'Na2SO4·10H2O'], ['Natriumsulfatdekahydrat', 'Na2SO4·10H2O'],
    ['sulfate de sodium décahydraté', 'Na2SO4·10H2O'], ['perchlorate de sodium monohydraté', 'NaClO4·H2O'], ['sulfato de sodio decahidratado', 'Na2SO4·10H2O'],
    ['sodium perchlorate monohydrate (NaClO4·H2O)', 'NaClO4·H2O'],
  ])('counts the water of %s: %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    ['trisodium phosphate', 'Na3PO4'], ['disodium phosphate', 'Na2HPO4'], ['monosodium phosphate', 'NaH2PO4'], ['sodium phosphate monobasic', 'NaH2PO4'], ['monobasic sodium phosphate', 'NaH2PO4'],
    ['Dinatriumhydrogenphosphat', 'Na2HPO4'], ['sodium dihydrogen phosphate', 'NaH2PO4'], ['trisodium citrate', 'Na3C6H5O7'], ['monosodium citrate', 'NaH2C6H5O7'],
  ])('tells the acid salts apart: %s is %s', (text, salt) => expect(reading(text)).toBe(salt))

  it.each([
    'blank', 'Blank 2', 'blank A', 'Blank (water)', 'BLANK', '0 mM', 'water', 'pure water', 'none', 'no salt', 'Leerwert', 'Blindwert', 'blanc', 'blanco', 'blindprøve', 'ohne Salz', 'uten salt', 'sans sel', 'sin sal', 'H2O', '0', 'buffer only',
  ])('takes %s as a blank', text => expect(readSalt(text)).toEqual({ kind: 'blank' }))

  it.each([
    ['NaSNC', 'NaSCN'], ['NaCI', 'NaCl'], ['Na2S04', 'Na2SO4'], ['sodium sufate', 'Na2SO4'], ['sodum chloride', 'NaCl'], ['sodium percholrate', 'NaClO4'], ['natriumsufat', 'Na2SO4'],
    ['sodum sufate', 'Na2SO4'], ['potassium cloride', 'KCl'], ['thyocyanate de sodium', 'NaSCN'], ['sodium floride', 'NaF'], ['NaSNC·H2O', 'NaSCN·H2O'],
  ])('finds %s misspelt and suggests %s', (text, salt) => expect(reading(text)).toBe(`misspelt: ${salt}`))

  it.each([
    ['Na2SCN', 'NaSCN'], ['NaSO4', 'Na2SO4'], ['Ca(NO3', 'Ca(NO3)2'], ['NH4)2SO4', '(NH4)2SO4'], ['CaSCN2', 'Ca(SCN)2'], ['NH42SO4', '(NH4)2SO4'], ['NaCl2', 'NaCl'], ['disodium chloride', 'NaCl'],
  ])('finds %s unbalanced and suggests %s', (text, salt) => expect(reading(text)).toBe(`unbalanced: ${salt}`))

  it.each([
    ['an anion alone', 'SCN-', 'NaSCN'], ['an anion alone', 'SO4^2-', 'Na2SO4'], ['an anion alone', 'Cl⁻', 'NaCl'], ['an anion alone', 'sulfate', 'Na2SO4'], ['an anion alone', 'SO42-', 'Na2SO4'], ['an anion alone', 'ClO4-', 'NaClO4'],
    ['water that is not counted', 'NaClO4·xH2O', 'NaClO4'], ['water that is not counted', 'sodium perchlorate hydrate', 'NaClO4'], ['a name of three salts', 'sodium phosphate', 'Na3PO4'],
  ])('asks about %s: %s, perhaps %s', (_, text, salt) => expect(reading(text)).toBe(`unknown: ${salt}`))

  it.each([
    'HCl', 'HNO3', 'H2SO4', 'KAl(SO4)2', 'COCl2', 'NaN', 'mean', 'name', 'sample A', 'Mittelwert', 'sodium', 'Na+', 'iron chloride', 'sodium bromide (NaCl)', 'NaI/NaCl', 'sodium nitrte', 'Natriumbromit', 'NaOD', 'NaCl-2', '', ' ', '-', 'x'.repeat(5000),
  ])('never makes a salt of %j', text => expect(reading(text)).toBe('unknown: no suggestion'))

  it.each(['NaClO2', 'NaClO3', 'NaNO2', 'Na2SO3', 'NaHSO4', 'KCN', 'NaN3', 'Na2S'])('leaves the rarer salt %s as it is', text => expect(reading(text)).toBe(text))
})

const knownSalt = fc.constantFrom(...ionPairs).map(([cation, anion]) => saltFrom(cation, anion))
const waters = fc.constantFrom(0, 0.5, 1, 2, 6, 10, 12)
const dots = fc.constantFrom('·', '.', '*', ' x ', ' × ', ' ')
const waterWords: Readonly<Record<number, string>> = { 0.5: 'hemi', 1: 'mono', 2: 'di', 6: 'hexa', 10: 'deca', 12: 'dodeca' }
const written = fc.constantFrom<(salt: { formula: string, name: string }, hydrate: number, dot: string) => string>(
  ({ formula }, hydrate, dot) => formula + (hydrate ? `${dot}${hydrate === 1 ? '' : hydrate}H2O` : ''),
  ({ formula }, hydrate, dot) => plainFormula(formula) + (hydrate ? `${dot}${hydrate} H₂O` : ''),
  ({ name }, hydrate) => name + (hydrate ? ` ${waterWords[hydrate]}hydrate` : ''),
  ({ name }, hydrate) => name.toUpperCase() + (hydrate ? `-${waterWords[hydrate]}hydrate` : ''),
  ({ name, formula }, hydrate) => `${name} (${hydrateFormula(formula, hydrate)})`,
)

describe('any salt of the tables', () => {
  it('reads back to itself in every way of writing', () => {
    fc.assert(fc.property(knownSalt, waters, dots, written, (salt, hydrate, dot, write) => {
      expect(readSalt(write(salt, hydrate, dot))).toEqual({ kind: 'salt', salt, hydrate })
    }), { seed: 3, numRuns: 3000 })
  })

  it('reads any text without failing', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme', maxLength: 60 }), text => ['salt', 'blank', 'unknown'].includes(readSalt(text).kind)), { seed: 4, numRuns: 2000 })
  })
})
