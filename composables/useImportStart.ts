import { largestFile, type ImportSummary, type TableImport } from '#shared/contracts/imports'
import { sentenceOf } from './problemOf'

/** Sends a file or a pasted table and goes on to its review. What is refused stays where it was typed. */
export function useImportStart(project: string, campaign: Ref<string>) {
  const refusal = ref('')
  const isBusy = ref(false)

  async function send(body: FormData | { text: string, name?: string }) {
    if (!campaign.value) {
      refusal.value = 'Choose the campaign that the readings belong to first.'
      return
    }
    refusal.value = ''
    isBusy.value = true
    try {
      const { id } = await $fetch<TableImport>(`/api/v1/campaigns/${campaign.value}/imports`, { method: 'POST', body, retry: 0 })
      await navigateTo(`/projects/${project}/import/${id}`)
    }
    catch (error) {
      refusal.value = sentenceOf(error)
    }
    finally {
      isBusy.value = false
    }
  }

  async function sendFile(file: File) {
    if (file.size > largestFile) {
      refusal.value = `${file.name} is larger than 10 MB, the most one import takes. Leave out what is no reading, or cut it into several files.`
      return
    }
    const form = new FormData()
    form.append('file', file)
    await send(form)
  }

  return { refusal, isBusy, sendFile, sendText: (text: string) => send({ text }) }
}

/** Imports of a project that somebody left open. */
export function useOpenImports(project: string) {
  const request = useRequestFetch()
  return useAsyncData(`imports of ${project}`, async () => {
    const { items } = await request<{ items: ImportSummary[] }>(`/api/v1/projects/${project}/imports`)
    return items.filter(({ state }) => state === 'open')
  }, { default: () => [] })
}
