import type { DemoReading } from './generate'

const columns = ['lab', 'campaign', 'day', 'anion', 'concentration', 'value', 'n', 'sdOfReplicates', 'note', 'setAsideReason', 'setAsideBy', 'setAsideOn'] as const
const separator = '\t'

/** Tab-separated: reasons are sentences with commas. */
export function toTable(readings: readonly DemoReading[]): string {
  const rows = readings.map(reading => columns.map(column => String(reading[column])).join(separator))
  return `${[columns.join(separator), ...rows].join('\n')}\n`
}

export function fromTable(text: string): DemoReading[] {
  const [header = '', ...rows] = text.trimEnd().split('\n')
  const names = header.split(separator)
  return rows.map((row) => {
    const cells = new Map(row.split(separator).map((cell, index) => [names[index], cell]))
    const words = (name: string) => cells.get(name) ?? ''
    return {
      lab: words('lab'),
      campaign: words('campaign'),
      day: words('day'),
      anion: words('anion'),
      concentration: Number(words('concentration')),
      value: Number(words('value')),
      n: Number(words('n')),
      sdOfReplicates: Number(words('sdOfReplicates')),
      note: words('note'),
      setAsideReason: words('setAsideReason'),
      setAsideBy: words('setAsideBy'),
      setAsideOn: words('setAsideOn'),
    }
  })
}
