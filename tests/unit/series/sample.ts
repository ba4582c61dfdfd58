import type { Series } from '#shared/contracts/series'
import { fitAsChosen, pointsOf } from '#shared/science/fitting'

export const batch = '01890000-0000-7000-8000-0000000000b1'
const campaign = '01890000-0000-7000-8000-0000000000c1'

/** Invented cloud points that bind and turn: concentration in mol/L, cloud point in °C; two blanks first. */
const measured = [[0, 31], [0, 31.02], [0.02, 31.25], [0.05, 31.54], [0.12, 31.93], [0.2, 32.07], [0.3, 32.09], [0.4, 31.86], [0.6, 31.47], [0.8, 30.81], [1, 30.17]] as const

export const idOf = (place: number) => `01890000-0000-7000-8000-${String(place).padStart(12, '0')}`

/** A series of two blanks and nine readings, numbered from 1; `change` alters single readings by number. */
export function sampleSeries(change: Record<number, Partial<Series['readings'][number]>> = {}, rest: Partial<Series> = {}): Series {
  const readings = measured.map(([x, y], index): Series['readings'][number] => ({
    id: idOf(index + 1), number: index + 1, x, y, sd: null, n: 3, batch: { id: batch, label: '4 March' }, direction: 'heating', limit: 'exact', blank: x === 0,
    note: null, setAside: null, entersFit: true, changed: null, origin: 'typed', ...change[index + 1],
  }))
  const made = fitAsChosen(pointsOf(readings), rest.choice ?? null)
  return {
    id: idOf(99), project: { id: campaign, name: 'A project' }, salt: { formula: 'NaSCN', name: 'sodium thiocyanate', anion: 'SCN^-', cation: 'Na^+' },
    campaign: { id: campaign, name: 'spring', lab: { id: campaign, name: 'A lab' }, clouds: 'on-heating', conditions: '' },
    stock: null, canEdit: true, revision: 1, choice: null,
    batches: [{ id: batch, label: '4 March', measuredOn: null, revision: 1, series: 2 }], readings,
    fit: made && { ...made.result, id: idOf(98) }, support: { verdict: null, models: [] },
    revisions: [{ number: 1, summary: '9 readings added', by: 'Tomas Okvist', at: '2026-03-04T10:00:00.000Z' }], ...rest,
  }
}
