const small = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve']

/** A small number as a word, as sentences have it; larger ones in digits. */
export function inWords(count: number): string {
  return small[count] ?? String(count)
}

/** A count with its noun: one salt, six campaigns. */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${inWords(count)} ${count === 1 ? one : many}`
}

/** Joins with commas and a last 'and'. */
export function listed(items: readonly string[]): string {
  if (items.length < 2) return items.join('')
  return `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`
}

export const capitalized = (sentence: string) => sentence.charAt(0).toUpperCase() + sentence.slice(1)

/** Words that somebody typed, as a sentence. */
export function asSentence(words: string): string {
  const trimmed = words.trim()
  return capitalized(/[.!?…]$/.test(trimmed) ? trimmed : `${trimmed}.`)
}
