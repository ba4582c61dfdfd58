import { describe, expect, it } from 'vitest'
import { addReading, chooseFit, chooseModel, giveReason, noDraft, setAside, typeCell, type Draft } from '~~/components/series/edit/draft'
import { choiceText } from '~~/components/series/edit/choice'
import { editedSeries } from '~~/components/series/edit/edited'
import { constantPairs } from '~~/components/series/versions/constants'
import { choiceSide, differingPlaces, joined, mineOver, type Versions } from '~~/components/series/versions/merge'
import { differingAspects, placesOf, readingWords } from '~~/components/series/versions/states'
import { batch, idOf, sampleSeries } from './sample'

const base = sampleSeries()
const moved = (change: Parameters<typeof sampleSeries>[0], rest: Parameters<typeof sampleSeries>[1] = {}) => sampleSeries(change, { revision: 2, ...rest })
const versionsOf = (draft: Draft, theirs = moved({})): Versions => ({ base, mine: editedSeries(base, draft).series, theirs, draft })
const corrected = (number: number, y: string) => giveReason(typeCell(noDraft, idOf(number), 'y', y), idOf(number), { reason: 'typing-error' })
const aside = { reason: 'dust', by: 'Tomas Okvist', at: '2026-03-05T10:00:00.000Z' }
const byTheirs = { sides: new Map(), choice: 'theirs' } as const

describe('two versions of a series', () => {
  it('join where they touch different readings', () => {
    const theirs = moved({ 9: { id: idOf(59), y: 31.4 } })
    const versions = versionsOf(corrected(8, '31.9'), theirs)
    const places = differingPlaces(versions)
    expect(places.map(({ mine, takes }) => [mine!.number, takes])).toEqual([[8, 'mine'], [9, 'theirs']])
    const sides = new Map(places.map(({ place, takes }) => [place, takes!]))
    expect(joined(versions, { sides, choice: 'theirs' })).toEqual({
      from: 2, batches: [], changes: [{ kind: 'correct', reading: idOf(8), to: { y: 31.9 }, reason: 'typing-error' }],
    })
  })

  it('need somebody where both changed the same reading, and address the reading as it is now', () => {
    const theirs = moved({ 8: { id: idOf(58), y: 31.8 } })
    const versions = versionsOf(corrected(8, '31.9'), theirs)
    const [only] = differingPlaces(versions)
    expect(only!.takes).toBeNull()
    expect(joined(versions, { ...byTheirs, sides: new Map([[only!.place, 'theirs']]) }).changes).toEqual([])
    expect(joined(versions, { ...byTheirs, sides: new Map([[only!.place, 'mine']]) }).changes).toMatchObject([{ reading: idOf(58), to: { y: 31.9 } }])
  })

  it('agree without a word where both did the same', () => {
    expect(differingPlaces(versionsOf(corrected(8, '31.9'), moved({ 8: { id: idOf(58), y: 31.9 } })))).toEqual([])
  })

  it('put mine over theirs whole: their corrections go back, their setting aside is undone', () => {
    const theirs = moved({ 9: { id: idOf(59), y: 31.4 }, 10: { setAside: aside, entersFit: false } })
    const { changes, from } = mineOver(versionsOf(corrected(8, '31.9'), theirs))
    expect(from).toBe(2)
    expect(changes).toEqual([
      { kind: 'correct', reading: idOf(8), to: { y: 31.9 }, reason: 'typing-error' },
      { kind: 'correct', reading: idOf(59), to: { y: 31.47 }, reason: 'other', words: 'as in revision 1, kept over revision 2' },
      { kind: 'put-back', reading: idOf(10) },
    ])
  })

  it('set aside what only they added when mine goes over it', () => {
    const theirs = moved({})
    theirs.readings.push({ ...theirs.readings[10]!, id: idOf(60), number: 12, x: 1.2, y: 29.5 })
    expect(mineOver(versionsOf(noDraft, theirs)).changes).toEqual([{ kind: 'set-aside', reading: idOf(60), reason: 'not in the version that was kept over revision 2' }])
  })

  it('keep what was added here, blanks in their batch with the state they have now', () => {
    const row = (draft: Draft, key: string, x: string, y: string) => typeCell(typeCell(draft, key, 'x', x), key, 'y', y)
    const draft = row(addReading(row(addReading(noDraft, batch), 'new-1', '1.2', '29.5'), batch), 'new-2', '0', '31.01')
    const theirs = moved({}, { batches: [{ ...base.batches[0]!, revision: 4 }] })
    expect(joined(versionsOf(draft, theirs), byTheirs)).toMatchObject({ changes: [{ kind: 'add', x: 1.2 }], batches: [{ batch, from: 4, changes: [{ kind: 'add', x: 0 }] }] })
  })

  it('carry setting aside over, with its reason', () => {
    const versions = versionsOf(setAside(noDraft, idOf(8), 'air bubble'), moved({ 8: { id: idOf(58), y: 31.8 } }))
    const [only] = differingPlaces(versions)
    const { changes } = joined(versions, { ...byTheirs, sides: new Map([[only!.place, 'mine']]) })
    expect(changes).toMatchObject([{ kind: 'correct', reading: idOf(58), to: { y: 31.86 } }, { kind: 'set-aside', reading: idOf(58), reason: 'air bubble' }])
  })

  it('take the form from whoever changed it', () => {
    const chosen = chooseFit(noDraft, chooseModel(choiceText(null), 'linear'))
    expect(choiceSide(versionsOf(noDraft))).toBeUndefined()
    expect(choiceSide(versionsOf(chosen))).toBe('mine')
    expect(choiceSide(versionsOf(noDraft, moved({}, { choice: { model: 'linear', options: {} } })))).toBe('theirs')
    expect(choiceSide(versionsOf(chosen, moved({}, { choice: { model: 'linear-hill', options: {} } })))).toBeNull()
    expect(joined(versionsOf(chosen), { sides: new Map(), choice: 'mine' }).choice).toEqual({ model: 'linear', options: {} })
  })
})

describe('readings beside each other', () => {
  it('say only in what they differ', () => {
    const [one, other] = [base.readings[7]!, { ...base.readings[7]!, y: 31.8, setAside: aside }]
    expect(readingWords(other, differingAspects([one, other]))).toBe('31.80, set aside: dust')
    expect(readingWords(one, differingAspects([one, other]))).toBe('31.86, in use')
  })

  it('are found by their place, whatever replaced them', () => {
    expect(placesOf(sampleSeries({ 8: { id: idOf(58) } }).readings).get('own 5')!.id).toBe(idOf(58))
  })
})

describe('constants beside each other', () => {
  it('give the shift in standard errors of the first', () => {
    const other = sampleSeries({ 8: { y: 32.4 } })
    const K = (of: typeof base) => of.fit!.parameters.find(({ name }) => name === 'K')!
    const pair = constantPairs(base.fit, other.fit).find(({ name }) => name === 'K')!
    const expected = (K(other).estimate! - K(base).estimate!) / K(base).standardError!
    expect(Math.abs(Number(pair.shift!.replace('−', '-')) - expected)).toBeLessThanOrEqual(0.05)
    expect(constantPairs(base.fit, null).find(({ name }) => name === 'K')).toMatchObject({ values: [expect.any(String), '—'], shift: null })
  })
})
