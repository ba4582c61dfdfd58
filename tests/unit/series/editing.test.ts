import { describe, expect, it } from 'vitest'
import { placedFaults } from '~~/components/series/edit/changes'
import { choiceText } from '~~/components/series/edit/choice'
import { addReading, chooseFit, chooseModel, giveReason, holdConstant, isBlankDraft, noDraft, placeInBatch, putBack, restoreCell, restoredDraft, setAside, typeCell, type Draft } from '~~/components/series/edit/draft'
import { editedSeries } from '~~/components/series/edit/edited'
import { batch, idOf, sampleSeries } from './sample'

const series = sampleSeries()
const estimate = (name: string, of = series) => of.fit!.parameters.find(one => one.name === name)!.estimate!
const typed = (field: 'x' | 'y' | 'sd' | 'n' | 'note', text: string, number = 8) => typeCell(noDraft, idOf(number), field, text)
const because = (draft: Draft, number = 8) => giveReason(draft, idOf(number), { reason: 'typing-error' })

describe('typing over a value', () => {
  it('moves the reading and the fit at once, and asks why', () => {
    const { series: next, faults, request } = editedSeries(series, typed('y', '32,4'))
    expect(next.readings[7]).toMatchObject({ y: 32.4, changed: { y: 31.86 } })
    expect(estimate('K', next)).not.toBe(estimate('K'))
    expect([...faults]).toEqual([[`${idOf(8)}.reason`, 'say why the value changes']])
    expect(request.body.changes).toHaveLength(1)
  })

  it('is sent as one correction with its reason', () => {
    const { faults, request } = editedSeries(series, because(typed('y', '32.4')))
    expect(faults.size).toBe(0)
    expect(request.body).toEqual({ from: 1, batches: [], changes: [{ kind: 'correct', reading: idOf(8), to: { y: 32.4 }, reason: 'typing-error' }] })
  })

  it('asks for words with the reason "other"', () => {
    const draft = giveReason(typed('y', '32.4'), idOf(8), { reason: 'other', words: ' ' })
    expect(editedSeries(series, draft).faults.get(`${idOf(8)}.words`)).toMatch(/say why/)
  })

  it.each([['y', '3l.4', /no number; 31.4 was meant/], ['y', '', /type a cloud point/], ['x', 'abc', /no number/], ['y', '318.6', /at most 150/], ['x', '-0.1', /0 or more/], ['n', '2.5', /whole number/]] as const)(
    'names %s "%s" in its place and goes on with what stood there', (field, text, sentence) => {
      const { faults, series: next } = editedSeries(series, because(typed(field, text)))
      expect(faults.get(`${idOf(8)}.${field}`)).toMatch(sentence)
      if (/no number|type/.test(sentence.source)) expect(next.readings[7]).toMatchObject({ x: 0.4, y: 31.86 })
    })

  it('of the same value is no change', () => {
    const { hasChanges, faults } = editedSeries(series, typed('y', '31,860'))
    expect(hasChanges).toBe(false)
    expect(faults.size).toBe(0)
  })

  it('is taken back whole', () => {
    expect(isBlankDraft(restoreCell(because(typed('y', '32.4')), idOf(8), 'y'))).toBe(true)
  })
})

describe('setting aside and putting back', () => {
  it('takes a reading out of the fit once, and needs a reason to be kept', () => {
    const { series: next, faults } = editedSeries(series, setAside(noDraft, idOf(8), ''))
    expect(next.fit!.n).toBe(series.fit!.n - 1)
    expect(faults.get(`${idOf(8)}.aside`)).toMatch(/say why/)
    expect(editedSeries(series, setAside(noDraft, idOf(8), 'air bubble')).request.body.changes).toEqual([{ kind: 'set-aside', reading: idOf(8), reason: 'air bubble' }])
  })

  it('lets a reading back in', () => {
    const without = sampleSeries({ 8: { setAside: { reason: 'dust', by: 'Ines Tamsel', at: '2026-03-05T10:00:00.000Z' }, entersFit: false } })
    const { series: next, request } = editedSeries(without, putBack(noDraft, idOf(8), true))
    expect(next.fit!.n).toBe(without.fit!.n + 1)
    expect(request.body.changes).toEqual([{ kind: 'put-back', reading: idOf(8) }])
  })

  it('does not let in a reading of the other branch', () => {
    const cooled = sampleSeries({ 8: { direction: 'cooling', setAside: { reason: 'dust', by: 'Ines Tamsel', at: '2026-03-05T10:00:00.000Z' }, entersFit: false } })
    expect(editedSeries(cooled, putBack(noDraft, idOf(8), true)).series.readings[7]!.entersFit).toBe(false)
  })
})

describe('adding readings', () => {
  const filled = (x: string, y: string, of: string | null = batch) => typeCell(typeCell(addReading(noDraft, of), 'new-1', 'x', x), 'new-1', 'y', y)

  it('draws and fits them as soon as both numbers are there', () => {
    expect(editedSeries(series, typeCell(addReading(noDraft, batch), 'new-1', 'x', '1.2')).series.readings).toHaveLength(series.readings.length)
    const { series: next, request } = editedSeries(series, filled('1,2', '29.5'))
    expect(next.readings.at(-1)).toMatchObject({ x: 1.2, y: 29.5, number: 12, entersFit: true })
    expect(request.body.changes).toEqual([{ kind: 'add', x: 1.2, y: 29.5, sd: null, n: null, note: null, batch, limit: 'exact' }])
  })

  it('sends a reading without salt to its batch', () => {
    expect(editedSeries(series, filled('0', '31.01')).request.body).toMatchObject({ changes: [], batches: [{ batch, from: 1, changes: [{ kind: 'add', x: 0, y: 31.01 }] }] })
    expect(editedSeries(series, placeInBatch(filled('0', '31.01'), 'new-1', null)).faults.get('new-1.batch')).toMatch(/belongs to a batch/)
  })

  it('leaves out a row in which nothing was typed', () => {
    expect(editedSeries(series, addReading(noDraft, batch))).toMatchObject({ hasChanges: false, isChanged: true })
  })
})

describe('blanks', () => {
  it('are changed in their batch, with the revision of its blanks', () => {
    const { request } = editedSeries(series, because(typed('y', '31.3', 1), 1))
    expect(request.body).toMatchObject({ changes: [], batches: [{ batch, from: 1, changes: [{ kind: 'correct', reading: idOf(1), to: { y: 31.3 } }] }] })
  })
})

describe('choosing how to fit', () => {
  const usual = choiceText(null)

  it('fits with the form and the held constant at once', () => {
    const choice = holdConstant(chooseModel(usual, 'linear-langmuir'), 'K', 'fixed', '4,5')
    const { series: next, request } = editedSeries(series, chooseFit(noDraft, choice))
    expect(estimate('K', next)).toBe(4.5)
    expect(request.body.choice).toEqual({ model: 'linear-langmuir', options: { parameters: { K: { fixed: 4.5 } } } })
  })

  it('is no change where it says what holds anyway', () => {
    expect(editedSeries(series, chooseFit(noDraft, usual)).hasChanges).toBe(false)
    const chosen = sampleSeries({}, { choice: { model: 'linear-langmuir', options: { weighting: 'none' } } })
    expect(editedSeries(chosen, chooseFit(noDraft, choiceText(chosen.choice))).hasChanges).toBe(false)
  })

  it('names what cannot be', () => {
    const crossed = holdConstant(holdConstant(chooseModel(usual, 'linear-langmuir'), 'K', 'min', '9'), 'K', 'max', '2')
    expect([...editedSeries(series, chooseFit(noDraft, crossed)).faults.keys()].some(where => where.startsWith('held.K'))).toBe(true)
    expect(editedSeries(series, chooseFit(noDraft, holdConstant(chooseModel(usual, 'linear'), 'c', 'fixed', 'x'))).faults.get('held.c.fixed')).toBe('must be a number')
  })

  it('drops held constants with their form', () => {
    expect(chooseModel(holdConstant(chooseModel(usual, 'linear-langmuir'), 'K', 'fixed', '4'), 'linear').held).toEqual({})
  })
})

describe('a refusal by the server', () => {
  it('finds the cell it is about', () => {
    const draft = because(typeCell(because(typed('y', '31.3', 1), 1), idOf(8), 'x', '0.41'))
    const { request } = editedSeries(series, draft)
    const faults = placedFaults([{ path: 'changes.0.to.x', message: 'a' }, { path: 'batches.0.changes.0.to', message: 'b' }, { path: 'choice.model', message: 'c' }], request.rows)
    expect(Object.fromEntries(faults)).toEqual({ [`${idOf(8)}.x`]: 'a', [`${idOf(1)}.y`]: 'b', 'choice.model': 'c' })
  })
})

describe('a draft that was kept', () => {
  it('comes back as it was', () => {
    const draft = chooseFit(addReading(setAside(because(typed('y', '32,')), idOf(5), 'dust'), batch), choiceText(null))
    expect(restoredDraft(JSON.parse(JSON.stringify(draft)))).toEqual(draft)
  })

  it.each([[null], [[]], ['text'], [{ cells: 3 }]])('of an unknown form is let go: %j', content => expect(restoredDraft(content)).toBeNull())
})
