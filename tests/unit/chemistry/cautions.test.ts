import { readFileSync } from 'node:fs'
import { gzipSync } from 'node:zlib'
import { describe, expect, it } from 'vitest'
import { cautionsOf } from '#shared/science/chemistry/cautions'
import committed from '#shared/science/chemistry/cautions.json'
import { ionPairs } from '#shared/science/chemistry/ion-lookup'
import { saltFrom, sodiumSalts } from '#shared/science/chemistry/salts'
import { cautionConfidence, cautionOpening } from '~~/components/ui/cautionText'
import { cautionTable } from '~~/data-seeds/chemistry/cautions'

const seed = (name: string) => readFileSync(new URL(`../../../data-seeds/chemistry/${name}`, import.meta.url), 'utf8')

/** What the cautions may add to a page. */
const mostBytes = 8192

describe('the table of cautions', () => {
  it('is what the seeds say', () => {
    expect(cautionTable(seed('hazards.csv'), seed('h_statements.csv'))).toEqual(committed)
  })

  it('stays small in the browser', () => {
    expect(gzipSync(JSON.stringify(committed)).length).toBeLessThan(mostBytes)
  })

  it('gives every code its words', () => {
    const codes = committed.salts.flatMap(salt => salt.codes)
    expect(codes.filter(code => !(code in committed.statements))).toEqual([])
  })

  it('says nothing by reference to another row', () => {
    expect(committed.salts.filter(({ handling }) => /^As /.test(handling))).toEqual([])
  })
})

describe('cautionsOf', () => {
  it('warns of perchlorate with polymer, of fluoride, and of thiocyanate with acid', () => {
    expect(cautionsOf('NaClO4')?.handling).toContain('do not evaporate polymer/perchlorate mixtures to dryness')
    expect(cautionsOf('NaF')?.statements).toContainEqual({ code: 'H301', text: 'Toxic if swallowed' })
    expect(cautionsOf('NaSCN')?.handling).toContain('hydrogen cyanide')
  })

  it('repeats in full what a row says by reference', () => {
    expect(cautionsOf('KClO4')?.handling).toMatch(/^Strong oxidiser.*sparingly soluble/i)
    expect(cautionsOf('KCN')?.handling).toContain('Avoid')
  })

  it('takes a hydrate and a name like the salt', () => {
    expect(cautionsOf('NaClO4·H2O')).toEqual(cautionsOf('NaClO4'))
    expect(cautionsOf('sodium perchlorate monohydrate')).toEqual(cautionsOf('NaClO4'))
  })

  it('has a record for every sodium salt of the hydration order', () => {
    expect(sodiumSalts.filter(({ formula }) => !cautionsOf(formula)?.isOwn).map(({ formula }) => formula)).toEqual([])
  })

  it('names the relatives it speaks of where the salt itself is not on record', () => {
    expect(cautionsOf('Ba(ClO4)2')).toMatchObject({ isOwn: false, of: ['NaClO4', 'BaCl2'] })
    expect(cautionsOf('Ba(ClO4)2')?.handling).toContain('Soluble barium is toxic')
  })

  it('does not lend a salt the hazard of another anion', () => {
    expect(cautionsOf('RbCl')).toBeNull()
    expect(cautionsOf('K2SO4')).toMatchObject({ isUnclassified: true, statements: [] })
  })

  it('knows nothing of what is no salt', () => {
    expect(cautionsOf('blank')).toBeNull()
    expect(cautionsOf('NaSNC')).toBeNull()
  })

  it.each(['CN^-', 'ClO4^-', 'SCN^-', 'F^-', 'N3^-', 'CrO4^2-', 'Cr2O7^2-', 'NO2^-'])('warns of every salt of %s', (ion) => {
    const bare = ionPairs.filter(([, anion]) => anion.formula === ion).map(([cation, anion]) => saltFrom(cation, anion).formula)
    expect(bare.filter(formula => !cautionsOf(formula)?.statements.length)).toEqual([])
  })
})

describe('the words about cautions', () => {
  it('say whose record it is, that there is none, or that the salt is not classified', () => {
    expect(cautionOpening('LiSCN', cautionsOf('LiSCN'))).toBe('No caution for LiSCN itself is on record here; this is what is on record for NaSCN and LiCl.')
    expect(cautionOpening('RbCl', null)).toBe('No caution for RbCl is on record here. That does not make it harmless.')
    expect(cautionOpening('Na2SO4', cautionsOf('Na2SO4'))).toBe('Na₂SO₄ is not usually classified as hazardous.')
    expect(cautionOpening('NaClO4', cautionsOf('NaClO4'))).toBe('')
  })

  it('say how the record was seen', () => {
    expect(cautionConfidence(cautionsOf('NaClO4')!)).toContain('from memory')
    expect(cautionConfidence(cautionsOf('Mg(ClO4)2')!)).toContain('read in a source')
  })
})
