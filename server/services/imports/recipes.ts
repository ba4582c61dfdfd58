import { and, asc, desc, eq, sql } from 'drizzle-orm'
import type { Question, TableChoices } from '#shared/tables/types'
import type { Transaction } from '~~/server/database/client'
import { membership, recipe } from '~~/server/database/schema'
import { ServiceError } from '../errors'

/** Answers that hold for the next file of the kind; which salt or batch it is does not. */
const lasting: readonly Question['code'][] = ['uncertainty-meaning', 'concentration-unit', 'temperature-unit', 'decimal-mark', 'date-order']

/** What of the choices says how files of this kind are read, and nothing about the rows of this one. */
export function mappingOf({ decimal, columns, answers = [] }: TableChoices): TableChoices {
  const kept = answers.filter(({ code }) => lasting.includes(code))
  return { ...(decimal && { decimal }), ...(columns && { columns }), ...(kept.length > 0 && { answers: kept }) }
}

/** The recipe of the campaign's lab, else of another lab of the person, that was made for such headings; the one used last. */
export async function recipeFor(tx: Transaction, lab: string, signature: string): Promise<typeof recipe.$inferSelect | null> {
  const [found] = await tx.select().from(recipe).where(eq(recipe.signature, signature))
    .orderBy(desc(sql`${recipe.lab} = ${lab}`), desc(sql`coalesce(${recipe.usedAt}, ${recipe.createdAt})`)).limit(1)
  return found ?? null
}

/** The campaign's lab where the person belongs to it, else the first lab of theirs: a recipe is the knowledge of one's own lab. */
async function labOf(tx: Transaction, who: string, lab: string): Promise<string> {
  const own = await tx.select({ lab: membership.lab }).from(membership).where(and(eq(membership.person, who))).orderBy(asc(membership.lab))
  const chosen = own.find(one => one.lab === lab) ?? own[0]
  if (chosen) return chosen.lab
  throw new ServiceError('invalid', 'A recipe belongs to a lab, and you belong to none.', { faults: [{ path: 'recipe', message: 'must be left out: you belong to no lab' }] })
}

/** Keeps how the columns were read under a name of the lab; the same name is replaced. */
export async function keepRecipe(tx: Transaction, who: string, lab: string, name: string, signature: string, choices: TableChoices): Promise<void> {
  const fields = { signature, choices: mappingOf(choices), madeBy: who, usedAt: new Date() }
  await tx.insert(recipe).values({ lab: await labOf(tx, who, lab), name, ...fields })
    .onConflictDoUpdate({ target: [recipe.lab, recipe.name], set: fields })
}
