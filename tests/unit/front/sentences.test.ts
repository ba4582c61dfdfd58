import { describe, expect, it } from 'vitest'
import type { ProjectChange, ProjectFront } from '#shared/contracts/front'
import { changeSentences } from '~~/components/project/front/changeSentences'
import { movedFigure } from '~~/components/project/front/movedFigure'
import { waitingFor } from '~~/components/project/front/waiting'
import { dayAgo } from '~~/components/project/front/when'

const salt = { formula: 'NaSCN', name: 'sodium thiocyanate', anion: 'SCN^-', cation: 'Na^+' }
const campaign = { id: 'c1', name: 'spring', lab: { id: 'l1', name: 'Norrvik' } }
const change = (part: Partial<ProjectChange>): ProjectChange => ({
  id: 'e1', at: '2026-03-04T09:12:00.000Z', by: 'Tomas Okvist', action: 'revised', subject: 'series', series: { id: 's1', salt }, campaign, values: { number: 15, summary: 'reading at 0.25 M corrected from 32.70, a typing error' }, ...part,
})
const said = (...changes: ProjectChange[]) => changeSentences(changes, 'p1')

describe('what changed', () => {
  it('is told with what to compare', () => {
    expect(said(change({}))).toEqual([{
      key: 'e1', at: '2026-03-04T09:12:00.000Z', by: 'Tomas Okvist', did: 'changed NaSCN, Norrvik, spring',
      detail: 'reading at 0.25 M corrected from 32.70, a typing error; revision 15', link: { to: '/projects/p1/series/s1/compare?a=14&b=15', words: 'Compare' },
    }])
  })

  it('gathers first readings of one person, campaign and day', () => {
    const first = (id: string, formula: string, at = '2026-03-04T16:00:00.000Z') => change({ id, at, series: { id, salt: { ...salt, formula } }, values: { number: 1, summary: '12 readings typed in' } })
    const told = said(first('a', 'NaCl'), first('b', 'Na2SO4'), first('c', 'NaI', '2026-03-03T16:00:00.000Z'))
    expect(told.map(({ did, detail }) => [did, detail])).toEqual([['began two series, Norrvik, spring', 'NaCl and Na₂SO₄'], ['began NaI, Norrvik, spring', '12 readings typed in']])
  })

  it.each<[Partial<ProjectChange>, string]>([
    [{ subject: 'blanks', series: null, values: { label: '4 March', summary: 'blank 1 corrected', number: 2 } }, 'changed the blanks of 4 March, Norrvik, spring'],
    [{ subject: 'import', action: 'imported', series: null, campaign: null, values: { file: 'bench.csv', readings: 22, series: 1 } }, 'imported 22 readings of one series'],
    [{ subject: 'campaign', action: 'made', series: null }, 'started the campaign Norrvik, spring'],
    [{ subject: 'batch', action: 'changed', series: null, values: { label: '5 March' } }, 'changed the batch 5 March'],
    [{ subject: 'sample', action: 'made', series: null, campaign: null, values: { name: 'sample 7' } }, 'added the sample “sample 7”'],
    [{ subject: 'stock', action: 'made', series: null, campaign: null, values: { salt: 'Na2SO4', lot: 'B4' } }, 'added a stock of Na₂SO₄'],
    [{ subject: 'series', action: 'changed', values: {} }, 'named the stock of NaSCN, Norrvik, spring'],
    [{ subject: 'project', action: 'made', series: null, campaign: null, values: {} }, 'started the project'],
    [{ series: null, campaign: null }, 'changed a salt, a campaign that is gone'],
  ])('has a sentence for %j', (part, did) => expect(said(change(part))[0]!.did).toBe(did))
})

describe('what waits', () => {
  const lacking = (id: string, missing: string[], batchesWithoutBlanks: string[] = []) => ({ ...campaign, id, conditions: '', missing, batchesWithoutBlanks })
  const front: Pick<ProjectFront, 'waits' | 'campaigns'> = {
    waits: {
      imports: [{ id: 'i1', name: 'bench.csv', state: 'open', campaign, rows: { ready: 1, toDecide: 1, unreadable: 0, kept: 0, total: 2 }, by: 'Ines Tamsel', at: '2026-03-04T09:12:00.000Z' }],
      drafts: [{ series: 's1', salt, campaign, at: '2026-03-04T09:12:00.000Z' }],
    },
    campaigns: [lacking('c1', ['pH', 'heating rate', 'tacticity', 'end groups'], ['5 March']), lacking('c2', ['pH', 'heating rate', 'tacticity', 'end groups']), lacking('c3', [])],
  }

  it('puts one\'s own work first and tells like campaigns together', () => {
    expect(waitingFor(front, 'p1', true).map(({ what, detail }) => [what, detail])).toEqual([
      ['Decide the import of bench.csv', 'Norrvik, spring'],
      ['Keep or drop what you typed in NaSCN', 'Norrvik, spring'],
      ['Measure blanks', 'Norrvik, spring: none in 5 March'],
      ['State four things for a report', 'two campaigns, Norrvik, spring among them: pH, heating rate, tacticity …'],
    ])
  })

  it('asks a reader for nothing that only editors change', () => {
    expect(waitingFor({ ...front, waits: { imports: [], drafts: [] } }, 'p1', false)).toEqual([])
  })
})

describe('a day that has passed', () => {
  const now = new Date('2026-03-05T08:00:00Z')
  it.each([['2026-03-05T00:10:00Z', 'today'], ['2026-03-04T23:50:00Z', 'yesterday'], ['2026-03-01T12:00:00Z', 'Sunday'], ['2026-02-10T12:00:00Z', '10 February'], ['2025-12-31T12:00:00Z', '31 December 2025']])(
    '%s is %s', (instant, words) => expect(dayAgo(instant, now)).toBe(words))
})

describe('the picture of moved constants', () => {
  const moved = (estimate: number, name = 'K'): ProjectFront['moved'][number] => ({ series: `${estimate}`, salt, campaign, name, unit: 'M⁻¹', before: { estimate, standardError: 0.3 }, now: { estimate: estimate + 1, standardError: 0.2 } })

  it('puts constants of one name on one axis, larger ones to the right, inside its ticks', () => {
    const { rows, ticks } = movedFigure([moved(4), moved(2), moved(-11, 'c')])!
    expect(rows).toHaveLength(2)
    for (const { before, now } of rows) {
      expect(before.x).toBeLessThan(now.x)
      expect(before.from).toBeGreaterThanOrEqual(ticks[0]!.x)
      expect(now.to).toBeLessThanOrEqual(ticks.at(-1)!.x)
    }
    expect(ticks.length).toBeGreaterThanOrEqual(3)
  })

  it('is left out where nothing moved', () => expect(movedFigure([])).toBeNull())

  it('stands even where an error is not known and all values are one', () => {
    const only = { ...moved(0), before: { estimate: 5, standardError: null }, now: { estimate: 5, standardError: null } }
    expect(movedFigure([only])!.rows.every(({ now }) => Number.isFinite(now.x))).toBe(true)
  })
})
