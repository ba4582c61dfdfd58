import type { Question, TableChoices } from '#shared/tables/types'
import type { HeldImport } from './held-import'

const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' })

/** Asks whether a file that this campaign has already is to come in again; only 'again' lets it. */
export function seenQuestion(seen: HeldImport['seen'], choices: TableChoices): Question[] {
  if (!seen) return []
  const answer = choices.answers?.findLast(({ code, value }) => code === 'seen-before' && (value === 'again' || value === 'stop'))?.value ?? null
  return [{
    code: 'seen-before', subject: '',
    message: `${seen.by} imported this very file into this campaign on ${day.format(seen.at)}. Its readings would stand there twice.`,
    options: [{ value: 'again', label: 'import it again' }, { value: 'stop', label: 'do not import it' }],
    answer, isAssumed: false, isBlocking: answer !== 'again',
  }]
}
