import type { LocationQueryRaw } from 'vue-router'

/** How each project's series were last looked at, so that coming back from one series finds the same view. */
export const useProjectView = defineStore('projectView', () => {
  const queries = ref<Record<string, LocationQueryRaw>>({})

  function remember(project: string, query: LocationQueryRaw) {
    queries.value[project] = query
  }

  const seriesPlace = (project: string) => ({ path: `/projects/${project}/series`, query: queries.value[project] })

  return { queries, remember, seriesPlace }
})
