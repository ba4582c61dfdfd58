/** What somebody did in a project, in words; the one catalogue of the front page. */
import type { ProjectChange } from '#shared/contracts/front'
import { plainFormula } from '#shared/science/chemistry/ions'
import { counted, listed } from '~~/components/project/overview/words'

export interface ChangeWords {
  key: string
  at: string
  by: string
  /** goes on after the name: 'corrected NaSCN, Norrvik, spring' */
  did: string
  /** one line more, or nothing */
  detail: string
  link: { to: string, words: string } | null
}

type Campaign = NonNullable<ProjectChange['campaign']>

const placeOf = (campaign: Campaign | null) => campaign ? `${campaign.lab.name}, ${campaign.name}` : 'a campaign that is gone'
const textOf = (value: unknown) => value === null || value === undefined ? '' : String(value)
const isFirst = ({ subject, action, values }: ProjectChange) => subject === 'series' && action === 'revised' && values.number === 1
const dayOf = ({ at }: ProjectChange) => at.slice(0, 10)

/** First readings of several salts in one campaign on one day are one piece of news. */
function groups(changes: readonly ProjectChange[]): ProjectChange[][] {
  const grouped = new Map<string, ProjectChange[]>()
  for (const change of changes) {
    const key = isFirst(change) ? [change.by, change.campaign?.id, dayOf(change)].join('\n') : change.id
    grouped.set(key, [...grouped.get(key) ?? [], change])
  }
  return [...grouped.values()]
}

/** The changes in sentences, newest first; such as come together are told together. */
export function changeSentences(changes: readonly ProjectChange[], project: string): ChangeWords[] {
  return groups(changes).map((group) => {
    const [change] = group as [ProjectChange, ...ProjectChange[]]
    const words = isFirst(change) ? firstReadings(group, project) : single(change, project)
    return { key: change.id, at: change.at, by: change.by, ...words }
  })
}

type Said = Pick<ChangeWords, 'did' | 'detail' | 'link'>

const seriesPlace = (project: string, series: string) => `/projects/${project}/series/${series}`
const saltOf = ({ series }: ProjectChange) => series ? plainFormula(series.salt.formula) : 'a salt'

function firstReadings(group: ProjectChange[], project: string): Said {
  const [change] = group as [ProjectChange, ...ProjectChange[]]
  const salts = group.map(saltOf)
  const place = placeOf(change.campaign)
  if (group.length === 1) {
    return { did: `began ${salts[0]}, ${place}`, detail: textOf(change.values.summary), link: change.series && { to: seriesPlace(project, change.series.id), words: 'Open' } }
  }
  return { did: `began ${counted(group.length, 'series', 'series')}, ${place}`, detail: listed(salts), link: { to: `/projects/${project}/series`, words: 'See them' } }
}

function single(change: ProjectChange, project: string): Said {
  const { subject, action, values, campaign } = change
  const made = action === 'made'
  switch (subject) {
    case 'series': return seriesChange(change, project)
    case 'blanks': return { did: `changed the blanks of ${textOf(values.label)}, ${placeOf(campaign)}`, detail: textOf(values.summary), link: { to: `/projects/${project}/series`, words: 'See the series' } }
    case 'import': return {
      did: `imported ${counted(Number(values.readings ?? 0), 'reading')} of ${counted(Number(values.series ?? 0), 'series', 'series')}`,
      detail: [textOf(values.file), textOf(values.campaign)].filter(Boolean).join(', '), link: { to: `/projects/${project}/series`, words: 'See the series' },
    }
    case 'campaign': return { did: `${made ? 'started' : 'changed'} the campaign ${placeOf(campaign)}`, detail: '', link: campaign && { to: `/projects/${project}/campaigns/${campaign.id}`, words: 'Open' } }
    case 'batch': return { did: `${made ? 'added' : 'changed'} the batch ${textOf(values.label)}`, detail: placeOf(campaign), link: campaign && { to: `/projects/${project}/campaigns/${campaign.id}`, words: 'Open' } }
    case 'sample': case 'instrument': return { did: `${made ? 'added' : 'changed'} the ${subject} “${textOf(values.name)}”`, detail: '', link: { to: `/projects/${project}/materials`, words: 'Open' } }
    case 'stock': return { did: `${made ? 'added' : 'changed'} a stock of ${plainFormula(textOf(values.salt))}`, detail: values.lot ? `lot ${textOf(values.lot)}` : '', link: { to: `/projects/${project}/materials`, words: 'Open' } }
    default: return { did: made ? 'started the project' : 'changed the project', detail: textOf(values.name), link: null }
  }
}

function seriesChange(change: ProjectChange, project: string): Said {
  const { action, values, series, campaign } = change
  const place = `${saltOf(change)}, ${placeOf(campaign)}`
  if (action !== 'revised') return { did: `named the stock of ${place}`, detail: '', link: series && { to: seriesPlace(project, series.id), words: 'Open' } }
  const number = Number(values.number)
  return {
    did: `changed ${place}`, detail: `${textOf(values.summary)}; revision ${number}`,
    link: series && { to: `${seriesPlace(project, series.id)}/compare?a=${number - 1}&b=${number}`, words: 'Compare' },
  }
}
