import { readdirSync, readFileSync } from 'node:fs'

/** The reference data beside the tests; each folder's README says where its numbers come from. */
export function readReference<Content>(path: string): Content {
  return JSON.parse(readFileSync(new URL(`./data/${path}`, import.meta.url), 'utf8')) as Content
}

export function readFolder<Content>(folder: string): Content[] {
  return readdirSync(new URL(`./data/${folder}/`, import.meta.url))
    .filter(name => name.endsWith('.json'))
    .map(name => readReference<Content>(`${folder}/${name}`))
}

/** Digits in agreement: −log10 of the relative difference, at most 11 because no certificate says more. */
export function digits(value: number | null, reference: number): number {
  if (value === null || !Number.isFinite(value)) return -Infinity
  if (value === reference) return 11
  return Math.min(11, -Math.log10(Math.abs(value - reference) / Math.abs(reference)))
}

export function fewestDigits(values: readonly (number | null)[], references: readonly (number | string)[]): number {
  return Math.min(...references.map((reference, j) => digits(values[j] ?? null, Number(reference))))
}
