import { operationsOf, type ApiDocument } from './apiOperations'

/** The API as its own description tells it. */
export async function useApiDescription() {
  const { data, error } = await useFetch<ApiDocument>('/api/v1/openapi.json')
  return {
    operations: computed(() => data.value ? operationsOf(data.value) : []),
    version: computed(() => data.value?.info.version ?? ''),
    hasFailed: computed(() => error.value !== undefined && error.value !== null),
  }
}
