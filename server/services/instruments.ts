import { and, eq } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { z } from 'zod'
import type { Instrument, newInstrumentContract } from '#shared/contracts/materials'
import { asPerson, type Transaction } from '~~/server/database/client'
import { instrument, lab, membership } from '~~/server/database/schema'
import { note } from './audit'
import { ServiceError } from './errors'

type NewInstrument = z.infer<typeof newInstrumentContract>

/** Whether an instrument is of a lab of the person's own, or one they see in a project; null where there is nothing to see. */
export function instrumentRight(who: string, id: string): Promise<'own' | 'see' | null> {
  return asPerson(who, async (tx) => {
    const [found] = await tx.select({ lab: instrument.lab }).from(instrument).where(eq(instrument.id, id))
    if (!found) return null
    return await isOfLab(tx, who, found.lab) ? 'own' : 'see'
  })
}

async function isOfLab(tx: Transaction, who: string, id: string): Promise<boolean> {
  const rows = await tx.select({ lab: membership.lab }).from(membership).where(and(eq(membership.person, who), eq(membership.lab, id)))
  return rows.length > 0
}

/** Instruments with their labs; `where` is written by the caller's question. */
export const instruments = (tx: Transaction) => tx.select({
  id: instrument.id, lab: { id: lab.id, name: lab.name }, name: instrument.name, kind: instrument.kind, pathLength: instrument.pathLength,
  wavelength: instrument.wavelength, probePlace: instrument.probePlace, calibratedOn: instrument.calibratedOn, offset: instrument.offset,
  offsetUncertainty: instrument.offsetUncertainty, offsetStatedOn: instrument.offsetStatedOn,
}).from(instrument).innerJoin(lab, eq(lab.id, instrument.lab)).$dynamic()

export function makeInstrument(who: string, project: string, given: NewInstrument): Promise<Instrument> {
  return asPerson(who, async (tx) => {
    if (!await isOfLab(tx, who, given.lab)) {
      throw new ServiceError('invalid', 'An instrument belongs to a lab of yours.', { faults: [{ path: 'lab', message: 'must be a lab you are a member of' }] })
    }
    const id = v7()
    await tx.insert(instrument).values({ id, ...given })
    await note(tx, who, { project, lab: given.lab, action: 'made', subject: 'instrument', id, values: { name: given.name } })
    const [made] = await instruments(tx).where(eq(instrument.id, id))
    return made!
  })
}

/** Changes everything but the lab, which an instrument keeps. */
export function changeInstrument(who: string, id: string, { lab: _, ...given }: NewInstrument): Promise<Instrument> {
  return asPerson(who, async (tx) => {
    await tx.update(instrument).set(given).where(eq(instrument.id, id))
    const [changed] = await instruments(tx).where(eq(instrument.id, id))
    await note(tx, who, { project: null, lab: changed!.lab.id, action: 'changed', subject: 'instrument', id, values: { name: given.name } })
    return changed!
  })
}
