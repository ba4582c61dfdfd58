import { and, asc, eq, getTableColumns, isNull } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { z } from 'zod'
import type { Campaign, CampaignForm, newCampaignContract } from '#shared/contracts/campaigns'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, instrument, lab, membership, project, projectLab, sample, series, seriesRevision } from '~~/server/database/schema'
import { note } from './audit'
import { batchesIn, seriesIn } from './campaign-content'
import { conditionsOf } from './conditions'
import { ServiceError, type Fault } from './errors'
import { instruments } from './instruments'
import { missingFrom } from './reporting'

type NewCampaign = z.infer<typeof newCampaignContract>
type Conditions = Omit<typeof campaign.$inferSelect, 'id' | 'project' | 'lab' | 'createdAt' | 'deletedAt'>

/** What holds where nobody states anything. */
const unstated: Omit<Conditions, 'name'> = {
  clouds: 'on-heating', sample: null, instrument: null, solvent: 'water', buffer: null, ph: null, polymerConcentration: null, criterion: null, criterionFraction: null,
  rate: null, hold: null, replicateKind: null, transitionEnthalpy: null, transitionEnthalpyBasis: null, startedOn: null,
}

function stated(given: CampaignForm, copied: Partial<Conditions> = {}): Conditions {
  const own = Object.fromEntries(Object.entries(given).filter(([, value]) => value !== undefined))
  return { ...unstated, ...copied, ...own, name: given.name }
}

/** Every fault that shows only beside the project: whose lab, whose sample, whose instrument. */
async function checkMaterials(tx: Transaction, where: { project: string, lab: string }, given: Conditions): Promise<void> {
  const faults: Fault[] = []
  if (given.sample) {
    const [found] = await tx.select({ project: sample.project }).from(sample).where(eq(sample.id, given.sample))
    if (found?.project !== where.project) faults.push({ path: 'sample', message: 'must be a sample of this project' })
  }
  if (given.instrument) {
    const [found] = await tx.select({ lab: instrument.lab }).from(instrument).where(eq(instrument.id, given.instrument))
    if (found?.lab !== where.lab) faults.push({ path: 'instrument', message: 'must be an instrument of the campaign\'s lab' })
  }
  if (given.criterionFraction !== null && given.criterion !== 'fraction') faults.push({ path: 'criterionFraction', message: 'belongs to the criterion "fraction" alone' })
  if (given.criterion === 'fraction' && given.criterionFraction === null) faults.push({ path: 'criterionFraction', message: 'must say which fraction, such as 0.5' })
  if ((given.transitionEnthalpy === null) !== (given.transitionEnthalpyBasis === null)) {
    faults.push({ path: given.transitionEnthalpy === null ? 'transitionEnthalpy' : 'transitionEnthalpyBasis', message: 'an enthalpy and its basis go together' })
  }
  if (faults.length > 0) throw new ServiceError('invalid', 'The campaign needs a change; nothing was kept.', { faults })
}

/** The lab that measures: the one named, or the person's only one in the project. */
async function labFor(tx: Transaction, who: string, of: string, named: string | undefined): Promise<string> {
  const own = await tx.selectDistinct({ id: lab.id, name: lab.name }).from(projectLab)
    .innerJoin(membership, and(eq(membership.lab, projectLab.lab), eq(membership.person, who)))
    .innerJoin(lab, eq(lab.id, projectLab.lab)).where(eq(projectLab.project, of)).orderBy(asc(lab.name))
  if (own.length === 0) throw new ServiceError('forbidden', 'A campaign is measured by a lab of the project, and you are a member of none of them. Ask an owner to bring your lab in.')
  const chosen = named ? own.find(({ id }) => id === named) : own.length === 1 ? own[0] : undefined
  if (chosen) return chosen.id
  const names = own.map(({ name }) => name).join(', ')
  throw new ServiceError('invalid', 'Which lab measures?', { faults: [{ path: 'lab', message: `must be one of your labs in this project: ${names}` }] })
}

async function refuseTakenName(tx: Transaction, of: { project: string, lab: string }, name: string, except?: string): Promise<void> {
  const [taken] = await tx.select({ id: campaign.id }).from(campaign)
    .where(and(eq(campaign.project, of.project), eq(campaign.lab, of.lab), eq(campaign.name, name), isNull(campaign.deletedAt)))
  if (taken && taken.id !== except) {
    throw new ServiceError('conflict', `Your lab has a campaign “${name}” in this project already. Choose another name.`, { faults: [{ path: 'name', message: 'is taken' }] })
  }
}

/** Conditions of a campaign one may see; none without one. Sample and instrument come along where they may. */
async function conditionsToCopy(tx: Transaction, from: string | undefined, into: { project: string, lab: string }): Promise<Partial<Conditions>> {
  if (!from) return {}
  const [found] = await tx.select().from(campaign).where(and(eq(campaign.id, from), isNull(campaign.deletedAt)))
  if (!found) throw new ServiceError('invalid', 'The campaign to copy from is not there.', { faults: [{ path: 'copyFrom', message: 'must be a campaign you may see' }] })
  const { clouds, solvent, buffer, ph, polymerConcentration, criterion, criterionFraction, rate, hold, replicateKind, transitionEnthalpy, transitionEnthalpyBasis } = found
  return {
    clouds, solvent, buffer, ph, polymerConcentration, criterion, criterionFraction, rate, hold, replicateKind, transitionEnthalpy, transitionEnthalpyBasis,
    sample: found.project === into.project ? found.sample : null,
    instrument: found.lab === into.lab ? found.instrument : null,
  }
}

/** Makes a campaign; what is not stated comes from the campaign to copy from. */
export function makeCampaign(who: string, of: string, given: NewCampaign): Promise<Campaign> {
  return asPerson(who, async (tx) => {
    const { lab: named, copyFrom, ...own } = given
    const where = { project: of, lab: await labFor(tx, who, of, named) }
    const conditions = stated(own, await conditionsToCopy(tx, copyFrom, where))
    await checkMaterials(tx, where, conditions)
    await refuseTakenName(tx, where, conditions.name)
    const id = v7()
    await tx.insert(campaign).values({ id, ...where, ...conditions })
    await note(tx, who, { ...where, action: 'made', subject: 'campaign', id, values: { name: conditions.name } })
    return readCampaign(tx, id)
  })
}

/** Which readings enter a fit hangs on the direction: with readings there it stays. */
async function refuseTurning(tx: Transaction, id: string): Promise<void> {
  const [measured] = await tx.select({ id: series.id }).from(series).innerJoin(seriesRevision, eq(seriesRevision.series, series.id)).where(eq(series.campaign, id)).limit(1)
  if (measured) throw new ServiceError('invalid', 'The campaign has readings already.', { faults: [{ path: 'clouds', message: 'cannot change once there are readings; make a new campaign for the other direction' }] })
}

/** The whole form again. */
export function changeCampaign(who: string, id: string, form: CampaignForm): Promise<Campaign> {
  return asPerson(who, async (tx) => {
    const given = stated(form)
    const [before] = await tx.select({ project: campaign.project, lab: campaign.lab, clouds: campaign.clouds }).from(campaign).where(eq(campaign.id, id)).for('update')
    await checkMaterials(tx, before!, given)
    await refuseTakenName(tx, before!, given.name, id)
    if (given.clouds !== before!.clouds) await refuseTurning(tx, id)
    await tx.update(campaign).set(given).where(eq(campaign.id, id))
    await note(tx, who, { project: before!.project, lab: before!.lab, action: 'changed', subject: 'campaign', id, values: { name: given.name } })
    return readCampaign(tx, id)
  })
}

export const showCampaign = (who: string, id: string): Promise<Campaign> => asPerson(who, tx => readCampaign(tx, id))

async function readCampaign(tx: Transaction, id: string): Promise<Campaign> {
  const [row] = await tx.select({ campaign: getTableColumns(campaign), sample, lab: { id: lab.id, name: lab.name }, project: { id: project.id, name: project.name } })
    .from(campaign).innerJoin(lab, eq(lab.id, campaign.lab)).innerJoin(project, eq(project.id, campaign.project))
    .leftJoin(sample, eq(sample.id, campaign.sample)).where(eq(campaign.id, id))
  const { campaign: head, ...others } = row!
  const [device] = head.instrument ? await instruments(tx).where(eq(instrument.id, head.instrument)) : []
  return {
    ...head, ...others,
    instrument: device ?? null,
    conditions: conditionsOf({ campaign: head, sample: others.sample }),
    missing: missingFrom(head, others.sample, device ?? null),
    batches: await batchesIn(tx, id),
    series: await seriesIn(tx, id),
  }
}
