import { rowChoices, showChoices, type RowChoice, type ShowChoice } from './seriesViewChoices'
import { useProjectView } from '~~/stores/projectView'
import type { RouteLocationRaw } from 'vue-router'

export type PlaceWith = (choice: { rows?: RowChoice, show?: ShowChoice }) => RouteLocationRaw

function known<Choice extends string>(value: unknown, choices: readonly Choice[], otherwise: Choice): Choice {
  return choices.find(choice => choice === value) ?? otherwise
}

const usual = { rows: 'anion', show: 'all' } as const
const beside = <Choice>(choice: Choice, usually: Choice) => choice === usually ? undefined : choice

/** Rows, selection and lab of the series page; the address holds them, so that it reproduces the view. */
export function useSeriesView(project: string) {
  const route = useRoute()
  const router = useRouter()
  const view = useProjectView()

  watch(() => route.query, query => view.remember(project, query), { immediate: true })

  const rows = computed(() => known<RowChoice>(route.query.rows, rowChoices, usual.rows))
  const show = computed(() => known<ShowChoice>(route.query.show, showChoices, usual.show))
  const lab = computed<string | null>({
    get: () => typeof route.query.lab === 'string' ? route.query.lab : null,
    set: name => void router.replace({ query: { ...route.query, lab: name ?? undefined } }),
  })
  /** Where another choice is seen; what is usual stays out of the address. */
  const placeWith: PlaceWith = (choice) => {
    const { rows: chosenRows, show: chosenShow } = { rows: rows.value, show: show.value, ...choice }
    return { query: { ...route.query, rows: beside(chosenRows, usual.rows), show: beside(chosenShow, usual.show) } }
  }
  return { rows, show, lab, placeWith }
}
