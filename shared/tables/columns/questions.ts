import type { Question, TableChoices } from '../types'

type Asked = Pick<Question, 'code' | 'subject' | 'message' | 'options'>

/**
 * A question with the answer in force: a person's, else ours (`assumed`), else none, and then nothing is imported before it is answered.
 * An answer that is none of its options, or that `isKnown` does not accept, is none.
 */
export function ask(asked: Asked, assumed: string | null, choices: TableChoices, isKnown = (value: string) => asked.options.some(option => option.value === value)): Question {
  const given = choices.answers?.findLast(({ code, subject, value }) => code === asked.code && subject === asked.subject && isKnown(value))?.value
  const answer = given ?? assumed
  return { ...asked, answer, isAssumed: given === undefined && assumed !== null, isBlocking: answer === null }
}

export const isOneOf = <T extends string>(values: readonly T[], value: string | null): value is T => values.some(known => known === value)

export const optionsOf = (values: readonly string[], labels: Readonly<Record<string, string>> = {}) => values.map(value => ({ value, label: labels[value] ?? value }))
