import type { ProjectFront } from '#shared/contracts/front'
import type { Campaign } from '#shared/contracts/campaigns'
import type { Materials } from '#shared/contracts/materials'
import type { Me } from '#shared/contracts/me'
import type { Project, ProjectDetail } from '#shared/contracts/projects'
import type { SeriesState } from '#shared/contracts/revisions'
import type { Series, SeriesSummary } from '#shared/contracts/series'

interface PageOf<Item> { items: Item[], nextCursor: string | null }

const largestPage = 200

/** Follows a paged list to its end. */
async function everyPage<Item>(fetchPage: (query: { limit: number, cursor?: string }) => Promise<PageOf<Item>>): Promise<Item[]> {
  const items: Item[] = []
  let cursor: string | null | undefined
  do {
    const page: PageOf<Item> = await fetchPage({ limit: largestPage, ...(cursor && { cursor }) })
    items.push(...page.items)
    cursor = page.nextCursor
  } while (cursor)
  return items
}

/** Who is signed in, with labs and projects. */
export function useMe() {
  const request = useRequestFetch()
  return useAsyncData('me', () => request<Me>('/api/v1/me'))
}

/** The projects of whoever is signed in. */
export function useProjects() {
  const request = useRequestFetch()
  return useAsyncData('projects', () => everyPage(query => request<PageOf<Project>>('/api/v1/projects', { query })), { default: () => [] })
}

/** One project with its labs, campaigns and members. */
export function useProject(project: string) {
  const request = useRequestFetch()
  return useAsyncData(`project ${project}`, () => request<ProjectDetail>(`/api/v1/projects/${project}`))
}

/** What the front page of a project tells. */
export function useProjectFront(project: string) {
  const request = useRequestFetch()
  return useAsyncData(`front of ${project}`, () => request<ProjectFront>(`/api/v1/projects/${project}/front`))
}

/** Every series of a project with its readings and current fit. */
export function useProjectSeries(project: string) {
  const request = useRequestFetch()
  return useAsyncData(`series of ${project}`, () => everyPage(query => request<PageOf<SeriesSummary>>(`/api/v1/projects/${project}/series`, { query })))
}

/** One series with all it holds. */
export function useSeries(series: string) {
  const request = useRequestFetch()
  return useAsyncData(`series ${series}`, () => request<Series>(`/api/v1/series/${series}`))
}

/** One revision of a series with its fit. */
export function useRevision(series: string, revision: MaybeRefOrGetter<string>) {
  const request = useRequestFetch()
  return useAsyncData(() => `revision ${toValue(revision)} of ${series}`, () => request<SeriesState>(`/api/v1/series/${series}/revisions/${toValue(revision)}`))
}

/** Samples, stocks and instruments that a project has to choose from. */
export function useMaterials(project: string) {
  const request = useRequestFetch()
  return useAsyncData(`materials of ${project}`, () => request<Materials>(`/api/v1/projects/${project}/materials`))
}

/** One campaign with its conditions, batches and series. */
export function useCampaign(campaign: string) {
  const request = useRequestFetch()
  return useAsyncData(`campaign ${campaign}`, () => request<Campaign>(`/api/v1/campaigns/${campaign}`))
}
