import { and, eq } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { z } from 'zod'
import type { Draft, keepDraftContract } from '#shared/contracts/revisions'
import { asPerson } from '~~/server/database/client'
import { draft, series } from '~~/server/database/schema'

type Given = z.infer<typeof keepDraftContract>

const ofSeries = (who: string, id: string) => and(eq(draft.person, who), eq(draft.kind, 'series'), eq(draft.subject, id))

function written({ content, updatedAt }: typeof draft.$inferSelect): Draft {
  return { ...content as Given, updatedAt: updatedAt.toISOString() }
}

/** What a person has typed on a series and not kept yet; null where there is nothing. */
export function showDraft(who: string, id: string): Promise<Draft | null> {
  return asPerson(who, async (tx) => {
    const [found] = await tx.select().from(draft).where(ofSeries(who, id))
    return found ? written(found) : null
  })
}

/** Puts the whole draft in place of the one before. */
export function keepDraft(who: string, id: string, content: Given): Promise<Draft> {
  return asPerson(who, async (tx) => {
    const [head] = await tx.select({ project: series.project }).from(series).where(eq(series.id, id))
    const [kept] = await tx.insert(draft).values({ id: v7(), person: who, project: head!.project, kind: 'series', subject: id, content })
      .onConflictDoUpdate({ target: [draft.person, draft.kind, draft.subject], set: { content, updatedAt: new Date() } }).returning()
    return written(kept!)
  })
}

export async function discardDraft(who: string, id: string): Promise<void> {
  await asPerson(who, tx => tx.delete(draft).where(ofSeries(who, id)))
}
