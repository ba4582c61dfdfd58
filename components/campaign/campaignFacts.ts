import type { Campaign } from '#shared/contracts/campaigns'
import { fixed } from '#shared/science/notation'
import type { FormField } from '~~/components/forms/fields'
import { counted } from '~~/components/project/overview/words'

/** A batch in a line: when, how many blanks, who leans on them. */
export function batchFacts({ measuredOn, blanks, series, referenceCheck, note }: Campaign['batches'][number]): string {
  const lean = series > 0 ? `, shared by ${counted(series, 'series', 'series')}` : ''
  return [
    measuredOn ? `measured on ${measuredOn}` : 'day not stated', `${blanks === 0 ? 'no blanks' : counted(blanks, 'blank')}${lean}`,
    referenceCheck !== null && `reference sample at ${fixed(referenceCheck, 2)} °C`, note,
  ].filter(Boolean).join('; ')
}

/** The conditions that are stated, as label and words, for who may only read. */
export function statedConditions(campaign: Campaign, fields: readonly FormField[]): [label: string, value: string][] {
  const values: Record<string, unknown> = { ...campaign, sample: campaign.sample?.id, instrument: campaign.instrument?.id }
  return fields.flatMap(({ name, label, options }): [string, string][] => {
    const value = values[name]
    if (value === null || value === undefined || value === '') return []
    return [[label, options?.find(([option]) => option === value)?.[1] ?? String(value)]]
  })
}
