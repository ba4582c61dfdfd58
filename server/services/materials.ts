import { asc, eq, getTableColumns, inArray } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { z } from 'zod'
import type { Materials, newSampleContract, newStockContract, Sample, Stock } from '#shared/contracts/materials'
import { hydrateFormula, readSalt } from '#shared/science/chemistry/read-salt'
import { asPerson, type Transaction } from '~~/server/database/client'
import { instrument, lab, projectLab, sample, stock } from '~~/server/database/schema'
import { note } from './audit'
import { ServiceError, type Fault } from './errors'
import { instruments } from './instruments'

type NewSample = z.infer<typeof newSampleContract>
type NewStock = z.infer<typeof newStockContract>

const stocks = (tx: Transaction) => tx.select({ ...getTableColumns(stock), lab: { id: lab.id, name: lab.name } })
  .from(stock).innerJoin(lab, eq(lab.id, stock.lab)).$dynamic()

function stockOf({ saltFormula, saltName, anion, cation, ...row }: Awaited<ReturnType<typeof stocks>>[number]): Stock {
  return { ...row, salt: { formula: saltFormula, name: saltName, anion, cation } }
}

/** Samples, stocks and instruments that a project's forms offer, in the order they were made. */
export function listMaterials(who: string, project: string): Promise<Materials> {
  return asPerson(who, async (tx) => {
    const labs = tx.select({ id: projectLab.lab }).from(projectLab).where(eq(projectLab.project, project))
    return {
      samples: await tx.select().from(sample).where(eq(sample.project, project)).orderBy(asc(sample.id)),
      stocks: (await stocks(tx).where(eq(stock.project, project)).orderBy(asc(stock.id))).map(stockOf),
      instruments: await instruments(tx).where(inArray(instrument.lab, labs)).orderBy(asc(instrument.id)),
    }
  })
}

export function makeSample(who: string, project: string, given: NewSample): Promise<Sample> {
  return asPerson(who, async (tx) => {
    const id = v7()
    const [made] = await tx.insert(sample).values({ id, project, ...given }).returning()
    await note(tx, who, { project, action: 'made', subject: 'sample', id, values: { name: given.name } })
    return made!
  })
}

export function changeSample(who: string, id: string, given: NewSample): Promise<Sample> {
  return asPerson(who, async (tx) => {
    const [changed] = await tx.update(sample).set(given).where(eq(sample.id, id)).returning()
    await note(tx, who, { project: changed!.project, action: 'changed', subject: 'sample', id, values: { name: given.name } })
    return changed!
  })
}

const saltFault = (message: string): ServiceError => new ServiceError('invalid', 'The salt of the stock needs a look.', { faults: [{ path: 'salt', message }] })

/** The salt and its water as the table of stocks holds them. @throws ServiceError 'invalid' where the text names no salt */
function saltFields({ salt: text, hydrate: stated }: NewStock) {
  const reading = readSalt(text)
  if (reading.kind === 'blank') throw saltFault('must be a salt; water needs no stock')
  if (reading.kind === 'unknown') {
    throw saltFault(reading.suggestion ? `“${text}” is not a salt known here; did you mean ${reading.suggestion}?` : `“${text}” is not a salt known here; write its formula, such as Na2SO4`)
  }
  const { salt, hydrate } = reading
  if (hydrate > 0 && stated !== null && stated !== hydrate) {
    throw new ServiceError('invalid', 'The water of the stock is stated twice.', {
      faults: [{ path: 'hydrate', message: `must agree with ${hydrateFormula(salt.formula, hydrate)}, or be left empty` } satisfies Fault],
    })
  }
  return { saltFormula: salt.formula, saltName: salt.name, anion: salt.anion, cation: salt.cation, hydrate: stated ?? hydrate }
}

async function checkLab(tx: Transaction, project: string, id: string): Promise<void> {
  const labs = await tx.select({ lab: projectLab.lab }).from(projectLab).where(eq(projectLab.project, project))
  if (!labs.some(({ lab: one }) => one === id)) {
    throw new ServiceError('invalid', 'A stock belongs to a lab of the project.', { faults: [{ path: 'lab', message: 'must be a lab of the project' }] })
  }
}

async function readStock(tx: Transaction, id: string): Promise<Stock> {
  const [row] = await stocks(tx).where(eq(stock.id, id))
  return stockOf(row!)
}

export function makeStock(who: string, project: string, given: NewStock): Promise<Stock> {
  return asPerson(who, async (tx) => {
    const { salt, hydrate: _, ...rest } = given
    const fields = { ...rest, ...saltFields(given) }
    await checkLab(tx, project, given.lab)
    const id = v7()
    await tx.insert(stock).values({ id, project, ...fields })
    await note(tx, who, { project, lab: given.lab, action: 'made', subject: 'stock', id, values: { salt, lot: given.lot } })
    return readStock(tx, id)
  })
}

export function changeStock(who: string, id: string, given: NewStock): Promise<Stock> {
  return asPerson(who, async (tx) => {
    const { salt, hydrate: _, ...rest } = given
    const fields = { ...rest, ...saltFields(given) }
    const [before] = await tx.select({ project: stock.project }).from(stock).where(eq(stock.id, id))
    await checkLab(tx, before!.project, given.lab)
    await tx.update(stock).set(fields).where(eq(stock.id, id))
    await note(tx, who, { project: before!.project, lab: given.lab, action: 'changed', subject: 'stock', id, values: { salt, lot: given.lot } })
    return readStock(tx, id)
  })
}
