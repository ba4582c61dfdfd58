/** What each file under tests/fixtures/tables is refused for. */
export const refusedFiles: readonly { file: string, code: string }[] = [
  { file: 'binary.csv', code: 'not-a-table' },
  { file: 'blank-lines.csv', code: 'empty' },
  { file: 'empty.csv', code: 'empty' },
  { file: 'header-only.csv', code: 'header-only' },
  { file: 'no-numbers.csv', code: 'no-numbers' },
  { file: 'ods-renamed.xlsx', code: 'ods' },
  { file: 'old-xls-renamed.xlsx', code: 'old-xls' },
  { file: 'one-column.csv', code: 'one-column' },
  { file: 'pdf-renamed.csv', code: 'pdf' },
  { file: 'picture-renamed.csv', code: 'not-a-table' },
  { file: 'web-page.csv', code: 'not-a-table' },
  { file: 'zip-renamed.csv', code: 'not-a-table' },
]

/** How each file is understood. `counts` are total, ready, to decide, unreadable, kept; problems are row, tone and code. */
export interface ExpectedFile {
  file: string
  /** format, encoding, decimal mark */
  cut: string
  form: 'long' | 'wide'
  /** header row, units row */
  head: [number | null, number | null]
  counts: [number, number, number, number, number]
  columns: string
  problems?: string[]
  questions?: string[]
}

export const understoodFiles: readonly ExpectedFile[] = [
  {
    file: 'NaSCN-repeats.txt', cut: 'whitespace utf-8 .', form: 'wide', head: [2, null], counts: [4, 3, 0, 0, 1],
    columns: 'concentration mol/L, cloud-point °C, cloud-point °C, cloud-point °C, kept',
    problems: ['1 kept preamble', '4 taken not-determined'],
    questions: ['salt-of-table NaSCN assumed'],
  },
  {
    file: 'aligned.txt', cut: 'whitespace utf-8 .', form: 'long', head: [3, null], counts: [4, 3, 0, 0, 1],
    columns: 'salt, concentration mol/L, cloud-point °C, note',
    problems: ['1 kept preamble', '5 taken stated-uncertainty'],
    questions: ['uncertainty-meaning 2 to answer'],
  },
  {
    file: 'american-dates.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, date',
  },
  {
    file: 'anions.csv', cut: 'csv utf-8 .', form: 'wide', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'concentration mol/L, cloud-point °C NaCl, cloud-point °C NaSCN, kept',
    questions: ['salt-of-table 1 to answer', 'salt-of-table 2 to answer'],
  },
  {
    file: 'batches.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [4, 4, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, batch, date',
  },
  {
    file: 'blank-dash.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 2, 1, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['3 decide no-salt'],
  },
  {
    file: 'branches-of-salts.csv', cut: 'csv utf-8 .', form: 'wide', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'concentration mol/L, cloud-point °C heating NaCl, cloud-point °C cooling NaCl, cloud-point °C heating NaSCN, cloud-point °C cooling NaSCN',
  },
  {
    file: 'branches.csv', cut: 'csv utf-8 .', form: 'wide', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C heating, uncertainty K heating, cloud-point °C cooling, uncertainty K cooling, samples',
    questions: ['uncertainty-meaning 3 sd-of-replicates assumed'],
  },
  {
    file: 'cells.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [15, 7, 1, 4, 3],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
    problems: ['2 taken stated-uncertainty', '3 taken stated-uncertainty', '4 taken unit-in-cell', '5 fault below-limit', '6 kept not-determined', '7 taken approximate', '7 taken approximate', '8 taken above-limit', '10 fault not-a-number', '11 fault no-concentration', '12 kept no-cloud-point', '13 decide no-salt', '14 kept no-cloud-point', '16 fault unit-in-cell'],
    questions: ['uncertainty-meaning 2 to answer', 'uncertainty-meaning 3 standard-uncertainty assumed'],
  },
  {
    file: 'comma-commas.csv', cut: 'csv utf-8 ,', form: 'long', head: [1, null], counts: [4, 3, 1, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['2 decide ragged'],
  },
  {
    file: 'cr-only.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'criteria.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, kept, kept',
  },
  {
    file: 'dates-for-numbers.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 2, 3, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, date',
    problems: ['2 taken date-number', '3 decide date-number', '4 decide date-number', '5 taken bad-date', '5 decide date-number'],
  },
  {
    file: 'decimal-mark-open.csv', cut: 'semicolon utf-8 .', form: 'long', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'salt, concentration mmol/L, cloud-point °C',
    problems: ['2 taken thousands', '3 taken thousands'],
    questions: ['decimal-mark to answer'],
  },
  {
    file: 'exported.csv', cut: 'csv utf-8 .', form: 'long', head: [3, null], counts: [8, 6, 0, 0, 2],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K, samples, direction, limit, batch, date, rate K/min, pH, set-aside, note',
    problems: ['1 kept preamble', '2 kept preamble'],
  },
  {
    file: 'fahrenheit.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °F, uncertainty °F',
    questions: ['uncertainty-meaning 3 standard-uncertainty assumed'],
  },
  {
    file: 'filled-down.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [6, 3, 3, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['4 decide no-salt', '5 decide no-salt', '7 decide no-salt'],
  },
  {
    file: 'formula-like.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 3, 0, 2, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, note',
    problems: ['2 taken formula-like', '3 taken formula-like', '3 taken formula-like', '4 fault formula-like', '4 taken formula-like', '5 taken formula-like', '5 taken formula-like', '6 fault formula-like'],
  },
  {
    file: 'french.csv', cut: 'semicolon utf-8 ,', form: 'long', head: [1, null], counts: [4, 3, 0, 0, 1],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K, samples, note',
    problems: ['5 kept summary-row'],
    questions: ['uncertainty-meaning 3 sd-of-replicates assumed'],
  },
  {
    file: 'kelvin-cell.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 4, 1, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['3 decide kelvin', '5 taken kelvin', '6 taken fahrenheit'],
  },
  {
    file: 'kelvin-under-celsius.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    questions: ['temperature-unit to answer'],
  },
  {
    file: 'kelvin-unsaid.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point K',
    questions: ['temperature-unit K assumed'],
  },
  {
    file: 'lab-book.tsv', cut: 'tsv utf-8 both', form: 'wide', head: [1, null], counts: [16, 12, 2, 1, 1],
    columns: 'concentration mol/L, salt, cloud-point °C heating, cloud-point °C cooling, uncertainty K, date, note',
    problems: ['4 taken unit-in-cell', '7 taken decimal-comma', '8 taken decimal-comma', '9 taken decimal-comma', '10 taken decimal-comma', '11 decide misspelt-salt', '12 fault outside-range', '13 taken remark', '14 taken no-uncertainty', '15 decide same-row', '17 kept summary-row'],
    questions: ['concentration-unit 0 mol/L assumed', 'uncertainty-meaning 4 to answer'],
  },
  {
    file: 'mixed-line-ends.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'negative.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 2, 0, 1, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['3 fault negative-concentration'],
  },
  {
    file: 'no-header.csv', cut: 'csv utf-8 .', form: 'long', head: [null, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
    questions: ['concentration-unit 1 mol/L assumed', 'uncertainty-meaning 3 to answer'],
  },
  {
    file: 'no-salt.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'concentration mmol/L, cloud-point °C',
    questions: ['salt-of-table to answer'],
  },
  {
    file: 'no-units.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration, cloud-point °C, uncertainty K',
    questions: ['concentration-unit 1 to answer', 'uncertainty-meaning 3 to answer'],
  },
  {
    file: 'norwegian.csv', cut: 'semicolon utf-8 ,', form: 'long', head: [1, null], counts: [4, 3, 0, 0, 1],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K, samples, date, note',
    problems: ['5 kept summary-row'],
    questions: ['uncertainty-meaning 3 sd-of-replicates assumed'],
  },
  {
    file: 'pipes.txt', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
  },
  {
    file: 'plain.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'preamble.csv', cut: 'csv utf-8 .', form: 'long', head: [5, null], counts: [5, 2, 0, 0, 3],
    columns: 'concentration mol/L, cloud-point °C, uncertainty K, samples',
    problems: ['1 kept preamble', '2 kept preamble', '3 kept preamble'],
    questions: ['uncertainty-meaning 2 standard-uncertainty assumed', 'salt-of-table NaSCN assumed'],
  },
  {
    file: 'quoted-newlines.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, note',
  },
  {
    file: 'ragged.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 2, 1, 0, 2],
    columns: 'salt, concentration mol/L, cloud-point °C, note, note',
    problems: ['4 kept no-cloud-point', '5 decide ragged', '6 kept remark'],
  },
  {
    file: 'repeated-header.csv', cut: 'csv utf-8 .', form: 'long', head: [1, 2], counts: [6, 4, 0, 0, 2],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['5 kept repeated-header', '6 kept repeated-header'],
  },
  {
    file: 'salts.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [11, 8, 2, 1, 0],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['10 decide unbalanced-salt', '11 decide misspelt-salt', '12 fault unknown-salt'],
  },
  {
    file: 'same-row.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [6, 3, 2, 0, 1],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
    problems: ['4 decide same-row', '5 kept same-row', '7 decide same-row', '7 taken no-uncertainty'],
    questions: ['uncertainty-meaning 3 standard-uncertainty assumed'],
  },
  {
    file: 'sections.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [6, 4, 0, 0, 2],
    columns: 'concentration mol/L, cloud-point K, samples',
    problems: ['2 kept remark', '5 kept remark', '7 taken stated-uncertainty'],
  },
  {
    file: 'sep-line.csv', cut: 'semicolon utf-8 ,', form: 'long', head: [2, null], counts: [3, 2, 0, 0, 1],
    columns: 'salt, concentration mol/L, cloud-point °C',
    problems: ['1 kept preamble'],
  },
  {
    file: 'side-by-side.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [2, 2, 0, 0, 0],
    columns: 'concentration mol/L, cloud-point °C, kept, kept, kept',
    questions: ['salt-of-table to answer'],
  },
  {
    file: 'spanish.csv', cut: 'semicolon utf-8 ,', form: 'long', head: [1, null], counts: [4, 3, 0, 0, 1],
    columns: 'salt, concentration mmol/L, cloud-point °C, uncertainty K, note',
    problems: ['5 kept summary-row'],
    questions: ['uncertainty-meaning 3 standard-uncertainty assumed'],
  },
  {
    file: 'thousands.csv', cut: 'semicolon utf-8 ,', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mmol/L, cloud-point °C',
    problems: ['4 taken thousands', '5 taken thousands', '6 taken thousands'],
  },
  {
    file: 'unclosed-quote.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, note',
  },
  {
    file: 'unknown-headings.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [3, 3, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, note',
    questions: ['concentration-unit 1 mol/L assumed'],
  },
  {
    file: 'utf-16be-bom.csv', cut: 'csv utf-16be .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'utf-16be.csv', cut: 'csv utf-16be .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'utf-16le-bom.csv', cut: 'csv utf-16le .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'utf-16le.csv', cut: 'csv utf-16le .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'utf-8-bom.csv', cut: 'csv utf-8 .', form: 'long', head: [1, null], counts: [5, 5, 0, 0, 0],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K',
  },
  {
    file: 'wide-groups.csv', cut: 'csv utf-8 .', form: 'wide', head: [2, null], counts: [3, 3, 0, 0, 0],
    columns: 'concentration mol/L, cloud-point °C NaCl, uncertainty K NaCl, cloud-point °C NaSCN, uncertainty K NaSCN',
    questions: ['uncertainty-meaning 2 sd-of-replicates assumed'],
  },
  {
    file: 'wide-salts.csv', cut: 'semicolon utf-8 ,', form: 'wide', head: [1, null], counts: [5, 4, 0, 0, 1],
    columns: 'concentration mmol/L, cloud-point °C NaCl, cloud-point °C Na2SO4, cloud-point °C NaSCN, note',
    problems: ['5 taken remark', '5 taken not-determined', '5 taken below-limit', '6 kept summary-row'],
  },
  {
    file: 'windows-1252.csv', cut: 'semicolon windows-1252 ,', form: 'long', head: [1, null], counts: [4, 3, 0, 0, 1],
    columns: 'salt, concentration mol/L, cloud-point °C, uncertainty K, note',
    problems: ['3 taken remark', '5 kept summary-row'],
    questions: ['uncertainty-meaning 3 standard-uncertainty assumed'],
  },
]
