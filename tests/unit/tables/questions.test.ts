import { describe, expect, it } from 'vitest'
import { signatureOf } from '#shared/tables/signature'
import type { Answer } from '#shared/tables/types'
import { questionsOf, readingsOf, understandFile, understandText } from './table'

const answers = (...given: [Answer['code'], string, string][]) => ({ answers: given.map(([code, subject, value]) => ({ code, subject, value })) })

describe('a question', () => {
  it('about an uncertainty decides what becomes of it', () => {
    const given = (value: string) => readingsOf(understandText('salt\tc (M)\tT (°C)\terr\tn\nNaCl\t0.1\t30.4\t0.3\t9\n', answers(['uncertainty-meaning', '3', value])))[0]
    expect(given('sd-of-replicates')).toMatchObject({ sd: 0.1, sdGiven: 0.3, sdMeaning: 'sd-of-replicates' })
    expect(given('standard-uncertainty')).toMatchObject({ sd: 0.3, sdGiven: 0.3, sdMeaning: 'standard-uncertainty' })
  })

  it('about ± in cells is asked of the column they stand in', () => {
    const text = 'salt\tc (M)\tT (°C)\tn\nNaCl\t0.1\t30.4 ± 0.3\t9\n'
    expect(questionsOf(understandText(text))).toEqual(['uncertainty-meaning 2 to answer'])
    expect(readingsOf(understandText(text, answers(['uncertainty-meaning', '2', 'sd-of-replicates'])))[0]).toMatchObject({ sd: 0.1, sdGiven: 0.3 })
  })

  it('about the unit of concentrations is assumed where numbers are small and asked where they are not', () => {
    expect(questionsOf(understandText('salt\tc\tT (°C)\nNaCl\t0.1\t30.4\nNaCl\t1.5\t22.1\n'))).toEqual(['concentration-unit 1 mol/L assumed'])
    const text = 'salt\tc\tT (°C)\nNaCl\t50\t30.4\nNaCl\t500\t26.1\n'
    expect(questionsOf(understandText(text))).toEqual(['concentration-unit 1 to answer'])
    expect(readingsOf(understandText(text, answers(['concentration-unit', '1', 'mmol/L']))).map(({ x }) => x)).toEqual([0.05, 0.5])
  })

  it('is not asked where every cell states its unit', () => {
    const understood = understandText('salt\tc\tT (°C)\nNaCl\t50 mM\t30.4\nNaCl\t0.1 M\t29.9\n')
    expect(questionsOf(understood)).toEqual([])
    expect(readingsOf(understood).map(({ x }) => x)).toEqual([0.05, 0.1])
  })

  it.each(['salt\tconc (g/L)\tT (°C)\nNaCl\t0.5\t30.4\n', 'salt\tconc\tT\n\twt%\t°C\nNaCl\t0.5\t30.4\n', 'salt\tc / µM\tT (°C)\nNaCl\t0.5\t30.4\n'])('is never assumed to be mol/L where another unit is stated: %j', (text) => {
    expect(understandText(text).questions).toEqual([expect.objectContaining({ code: 'concentration-unit', isBlocking: true, message: expect.stringContaining('cannot be converted') })])
  })

  it('about an expanded uncertainty has no answer of ours', () => {
    expect(questionsOf(understandText('salt\tc (M)\tT (°C)\tU (k=2)\nNaCl\t0.1\t30.4\t0.2\n'))).toEqual(['uncertainty-meaning 3 to answer'])
  })

  it('about “Tcp ± sd” is assumed from the words', () => {
    expect(questionsOf(understandText('salt\tc (M)\tTcp ± SD (°C)\nNaCl\t0.1\t30.4 ± 0.2\n'))).toEqual(['uncertainty-meaning 2 sd-of-replicates assumed'])
  })

  it('about kelvin under °C is answered either way', () => {
    const of = (value: string) => readingsOf(understandFile('kelvin-under-celsius.csv', answers(['temperature-unit', '', value]))).map(({ y }) => y)
    expect(of('K')).toEqual([31.86, 31.45, 30.95])
    expect(of('°C')).toEqual([])
  })

  it('about the decimal mark settles 1,250', () => {
    const of = (value: string) => readingsOf(understandFile('decimal-mark-open.csv', answers(['decimal-mark', '', value]))).map(({ x }) => x)
    expect(of('.')).toEqual([1.25, 2.5])
    expect(of(',')).toEqual([0.00125, 0.0025])
  })

  it('about the order of dates is assumed, not blocking', () => {
    const text = 'salt\tc (M)\tT (°C)\tdate\nNaCl\t0.1\t30.4\t04/03/2026\n'
    expect(questionsOf(understandText(text))).toEqual(['date-order day-month-year assumed'])
    expect(readingsOf(understandText(text))[0]).toMatchObject({ date: '2026-03-04' })
    expect(readingsOf(understandText(text, answers(['date-order', '', 'month-day-year'])))[0]).toMatchObject({ date: '2026-04-03' })
  })

  it('about the salt is assumed from a line above the table or the name of the file, or asked', () => {
    expect(questionsOf(understandFile('preamble.csv'))).toContain('salt-of-table NaSCN assumed')
    expect(questionsOf(understandFile('no-salt.csv', {}, { fileName: '2026-03-04_Na2SO4_run1.csv' }))).toEqual(['salt-of-table Na2SO4 assumed'])
    expect(readingsOf(understandFile('no-salt.csv', answers(['salt-of-table', '', 'sodium bromide']))).map(({ salt }) => salt)).toEqual([null, 'NaBr', 'NaBr'])
  })

  it('is still open after an answer that is none', () => {
    expect(questionsOf(understandFile('no-salt.csv', answers(['salt-of-table', '', 'sugar'])))).toEqual(['salt-of-table to answer'])
    expect(questionsOf(understandFile('no-units.csv', answers(['concentration-unit', '1', 'furlongs'])))).toContain('concentration-unit 1 to answer')
  })

  it('about the salt is not asked where the heading of the concentrations names it', () => {
    const understood = understandText('c(NaCl) / M\tT / °C\n0\t31\n0.1\t30.4\n')
    expect(questionsOf(understood)).toEqual([])
    expect(readingsOf(understood).map(({ salt }) => salt)).toEqual([null, 'NaCl'])
  })

  it('about a column headed by an anion takes the salt of the answer', () => {
    const understood = understandFile('anions.csv', answers(['salt-of-table', '1', 'KCl'], ['salt-of-table', '2', 'NaSCN']))
    expect(questionsOf(understood)).toEqual(['salt-of-table 1 KCl', 'salt-of-table 2 NaSCN'])
    expect(understood.columns[1]).toMatchObject({ salt: 'KCl' })
  })

  it('about a batch of the same name is assumed on the same day, asked on another', () => {
    const batches = [{ label: 'a', measuredOn: '2026-03-04' }, { label: 'B', measuredOn: '2026-02-01' }, { label: 'C', measuredOn: null }]
    const understood = understandFile('batches.csv', {}, { batches })
    expect(questionsOf(understood)).toEqual(['batch-exists A join assumed', 'batch-exists B to answer'])
    expect(questionsOf(understandFile('batches.csv', answers(['batch-exists', 'B', 'apart']), { batches }))).toContain('batch-exists B apart')
  })
})

describe('one name for batches of several days', () => {
  const text = 'salt\tc (M)\tT (°C)\tbatch\tdate\nNaCl\t0.1\t30.4\tA\t2026-03-04\nNaCl\t0.2\t29.9\tA\t2026-03-05\n'
  const labels = (choices = {}) => readingsOf(understandText(text, choices)).map(({ batch }) => batch)

  it('is taken for one batch, and said', () => {
    expect(questionsOf(understandText(text))).toEqual(['batch-exists A join assumed'])
    expect(labels()).toEqual(['A', 'A'])
  })

  it('becomes a batch for each day where a person says so', () => {
    expect(labels(answers(['batch-exists', 'A', 'apart']))).toEqual(['A, 2026-03-04', 'A, 2026-03-05'])
  })
})

describe('what a person says about columns', () => {
  const text = 'salt\tc (M)\tT10 (°C)\tT50 (°C)\tthing\nNaCl\t0.1\t30.4\t30.9\t3\nNaCl\t0.2\t29.9\t30.3\t3\n'

  it('moves what there is one of and lets the other stay with the file', () => {
    const understood = understandText(text, { columns: [{ index: 3, meaning: 'cloud-point' }, { index: 4, meaning: 'samples' }] })
    expect(understood.columns.map(({ meaning }) => meaning)).toEqual(['salt', 'concentration', 'kept', 'cloud-point', 'samples'])
    expect(readingsOf(understood).map(({ y, n }) => [y, n])).toEqual([[30.9, 3], [30.3, 3]])
  })

  it('states units, salts and meanings without further questions', () => {
    const columns = [{ index: 0, unit: 'mmol/L' }, { index: 1, salt: 'sodium chloride' }, { index: 2, uncertaintyMeaning: 'standard-uncertainty' as const }]
    const understood = understandText('c\tT\terr\n50\t30.4\t0.1\n500\t26.1\t0.1\n', { columns })
    expect(understood.questions).toEqual([])
    expect(readingsOf(understood)[1]).toMatchObject({ salt: 'NaCl', x: 0.5, sd: 0.1 })
  })

  it('reads a table again by what was understood of it, without asking again', () => {
    const first = understandFile('lab-book.tsv', answers(['uncertainty-meaning', '4', 'standard-uncertainty']))
    const again = understandFile('lab-book.tsv', { columns: first.columns })
    expect(again.questions).toEqual([])
    expect(again.counts).toEqual(first.counts)
  })

  it('names another header row, or none', () => {
    expect(understandText(text, { headerRow: 2 })).toMatchObject({ headerRow: 2, counts: { total: 2 } })
    expect(understandText(text, { headerRow: 0 })).toMatchObject({ headerRow: null, counts: { total: 3 } })
  })
})

describe('remarks on the whole file', () => {
  it('name columns that were read by their values, until a person has looked', () => {
    const first = understandFile('unknown-headings.csv')
    expect(first.remarks).toEqual([expect.stringMatching(/“Probe”, “Menge”, “Messwert” are read by what the column holds/)])
    expect(understandFile('unknown-headings.csv', { columns: first.columns }).remarks).toEqual([])
  })

  it('name columns that stay behind because another was taken', () => {
    expect(understandFile('criteria.csv').remarks).toEqual([expect.stringContaining('“T50 (°C)”, “T90 (°C)” stay with the file')])
  })

  it('say which branch does not enter the fit', () => {
    expect(understandFile('branches.csv').remarks).toEqual(['2 readings were taken on cooling; the campaign clouds on heating. They are kept and drawn, and do not enter the fit.'])
    expect(understandFile('branches.csv', {}, { clouds: 'on-cooling' }).remarks).toEqual([expect.stringMatching(/^3 readings were taken on heating/)])
  })

  it('say that there is no header', () => {
    expect(understandFile('no-header.csv').remarks).toEqual([expect.stringContaining('No header was found')])
  })
})

describe('signatureOf', () => {
  it('is the same for files of one kind and another for others', () => {
    const [one, two, other] = ['Salt\tc (M)\tT (°C)\nNaCl\t0.1\t30.4\n', 'salt \t c (M)\tT  (°C)\nNaBr\t0.2\t31.4\n', 'salt\tc (mM)\tT (°C)\nNaCl\t100\t30.4\n'].map(text => signatureOf(understandText(text)))
    expect(one).toBe(two)
    expect(one).not.toBe(other)
    expect(signatureOf(understandText('Salt\tc (M)\tT (°C)\nNaCl\t0.1\t30.4\tslow\n'))).toBe(one)
  })
})
