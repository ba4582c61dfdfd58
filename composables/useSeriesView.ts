import { rowChoices, showChoices, type RowChoice, type ShowChoice } from './seriesViewChoices'
import { useProjectView } from '~~/stores/projectView'

function known<Choice extends string>(value: unknown, choices: readonly Choice[], otherwise: Choice): Choice {
  return choices.find(choice => choice === value) ?? otherwise
}

/** Rows, selection and lab of the series page; the address holds them, so that it reproduces the view. */
export function useSeriesView(project: string) {
  const route = useRoute()
  const router = useRouter()
  const view = useProjectView()

  function set(name: string, value: string | undefined) {
    const query = { ...route.query, [name]: value }
    view.remember(project, query)
    return router.replace({ query })
  }

  const rows = computed<RowChoice>({
    get: () => known(route.query.rows, rowChoices, 'anion'),
    set: choice => void set('rows', choice === 'anion' ? undefined : choice),
  })
  const show = computed<ShowChoice>({
    get: () => known(route.query.show, showChoices, 'all'),
    set: choice => void set('show', choice === 'all' ? undefined : choice),
  })
  const lab = computed<string | null>({
    get: () => typeof route.query.lab === 'string' ? route.query.lab : null,
    set: name => void set('lab', name ?? undefined),
  })
  return { rows, show, lab }
}
