import type { SeriesSummary } from '#shared/contracts/series'
import { anionOf, hydrationOrder } from '#shared/science/chemistry/ions'
import type { RowChoice, ShowChoice } from '~~/composables/seriesViewChoices'
import type { Attention } from '#shared/science/pooling/findings'

/** One column of panels; the first of a group carries its title. */
export interface Column {
  key: string
  group: string
  title: string
  isFirst: boolean
  /** anion that heads the column, where rows are campaigns */
  ion: string | null
}

export interface Row {
  key: string
  title: string
  group: string
  ion: string | null
  /** one a column; null where nothing is shown */
  cells: (SeriesSummary | null)[]
}

export interface Arrangement {
  columns: Column[]
  rows: Row[]
}

const campaignTitle = ({ campaign }: SeriesSummary) => `${campaign.lab.name}, ${campaign.name}`

const shows: Record<ShowChoice, (series: SeriesSummary, attention: ReadonlyMap<string, Attention>) => boolean> = {
  'all': () => true,
  'to-look-at': ({ id }, attention) => attention.has(id),
  'binding': ({ fit }) => fit?.parameters.some(({ name }) => name === 'K') ?? false,
  'set-aside': ({ readings }) => readings.some(reading => reading.setAside),
}

/** The series a choice shows. */
export function shown(series: readonly SeriesSummary[], choice: ShowChoice, attention: ReadonlyMap<string, Attention>): SeriesSummary[] {
  return series.filter(one => shows[choice](one, attention))
}

function markFirsts(columns: Omit<Column, 'isFirst'>[]): Column[] {
  return columns.map((column, index) => ({ ...column, isFirst: column.group !== columns[index - 1]?.group }))
}

/** Campaigns in the order labs and seasons were made: a lab's campaigns stay together. */
function campaignsOf(series: readonly SeriesSummary[]) {
  const campaigns = [...new Map(series.map(one => [one.campaign.id, one])).values()]
  const labs = [...new Set(campaigns.map(({ campaign }) => campaign.lab.name))]
  return campaigns.sort((a, b) => labs.indexOf(a.campaign.lab.name) - labs.indexOf(b.campaign.lab.name))
}

const ionsOf = (series: readonly SeriesSummary[]) =>
  [...new Set(series.map(({ salt }) => salt.anion))].sort((a, b) => hydrationOrder(a) - hydrationOrder(b))

/**
 * Lays series out as a table of panels. Rows without anything to show are left out; columns stay, so that panels keep their place.
 *
 * @param all every series of the project that the chosen labs have
 * @param chosen those to show
 * @param order anions from the top of the rail down
 */
export function arrange(all: readonly SeriesSummary[], chosen: readonly SeriesSummary[], rows: RowChoice, order: readonly string[]): Arrangement {
  const visible = new Set(chosen.map(({ id }) => id))
  const find = (campaign: string, ion: string) =>
    all.find(one => one.campaign.id === campaign && one.salt.anion === ion && visible.has(one.id)) ?? null
  const arranged = rows === 'anion' ? byAnion(all, order, find) : byCampaign(all, find)
  return { ...arranged, rows: arranged.rows.filter(row => row.cells.some(Boolean)) }
}

type Find = (campaign: string, ion: string) => SeriesSummary | null

function byAnion(all: readonly SeriesSummary[], order: readonly string[], find: Find): Arrangement {
  const campaigns = campaignsOf(all)
  return {
    columns: markFirsts(campaigns.map(({ campaign }) => ({ key: campaign.id, group: campaign.lab.name, title: campaign.name, ion: null }))),
    rows: order.map(ion => ({ key: ion, title: anionOf(ion)?.name ?? ion, group: '', ion, cells: campaigns.map(({ campaign }) => find(campaign.id, ion)) })),
  }
}

function byCampaign(all: readonly SeriesSummary[], find: Find): Arrangement {
  const ions = ionsOf(all)
  return {
    columns: markFirsts(ions.map(ion => ({ key: ion, group: 'salts', title: anionOf(ion)?.name ?? ion, ion }))),
    rows: campaignsOf(all).map(one => ({
      key: one.campaign.id,
      title: one.campaign.name,
      group: one.campaign.lab.name,
      ion: null,
      cells: ions.map(ion => find(one.campaign.id, ion)),
    })),
  }
}

/** Places of the columns with the first of every group before the second ones: a season side by side. */
export function acrossGroups(columns: readonly Column[]): number[] {
  const rank = columns.map((column, place) => place - columns.findIndex(other => other.group === column.group))
  return columns.map((_, place) => place).sort((a, b) => rank[a]! - rank[b]! || a - b)
}

/** Words for one series: thiocyanate, Norrvik, spring. */
export function seriesTitle(series: SeriesSummary): string {
  return `${anionOf(series.salt.anion)?.name ?? series.salt.anion}, ${campaignTitle(series)}`
}
