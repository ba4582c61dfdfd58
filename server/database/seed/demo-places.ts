import { inArray } from 'drizzle-orm'
import { v7 } from 'uuid'
import { sodiumSalts } from '#shared/science/chemistry/salts'
import type { DemoReading } from '~~/data-seeds/demo/generate'
import setting from '~~/data-seeds/demo/setting.json'
import truth from '~~/data-seeds/demo/truth.json'
import type { Transaction } from '../client'
import { batch, campaign, instrument, lab, sample, stock } from '../schema'

/** Where the readings of the demonstration hang: ids by the names the table of readings uses. */
export interface Places {
  stocks: ReadonlyMap<string, string>
  campaigns: ReadonlyMap<string, string>
  batches: ReadonlyMap<string, string>
}

export type LabName = keyof typeof setting.labs
export const labNames = Object.keys(setting.labs) as LabName[]
export const stockKey = (labName: string, anion: string) => `${labName} ${anion}`
export const campaignKey = (labName: string, name: string) => `${labName}, ${name}`
export const batchKey = (labName: string, day: string) => `${labName} ${day}`

async function labIds(tx: Transaction): Promise<Map<string, string>> {
  const found = await tx.select().from(lab).where(inArray(lab.name, labNames))
  return new Map(found.map(one => [one.name, one.id]))
}

async function plantStocks(tx: Transaction, project: string, labs: ReadonlyMap<string, string>) {
  const stocks = labNames.flatMap(labName => sodiumSalts.map((salt) => {
    const aged = setting.agedStocks.find(one => one.lab === labName && one.anion === salt.anion)
    return {
      key: stockKey(labName, salt.anion),
      row: {
        id: v7(),
        project,
        lab: labs.get(labName)!,
        saltFormula: salt.formula,
        saltName: salt.name,
        anion: salt.anion,
        cation: salt.cation,
        lot: `${labName.slice(0, 1)}-${salt.formula}`,
        purity: setting.stocks.purity,
        madeOn: aged?.madeOn ?? setting.stocks.madeOn,
        relativeUncertainty: setting.stocks.relativeUncertainty,
      },
    }
  }))
  await tx.insert(stock).values(stocks.map(({ row }) => row))
  return new Map(stocks.map(({ key, row }) => [key, row.id]))
}

async function plantInstruments(tx: Transaction, labs: ReadonlyMap<string, string>) {
  const instruments = labNames.map((labName) => {
    const { kind, ...rest } = setting.labs[labName].instrument
    return { id: v7(), lab: labs.get(labName)!, kind: kind as typeof instrument.$inferInsert.kind, ...rest }
  })
  await tx.insert(instrument).values(instruments)
  return new Map(labNames.map((labName, index) => [labName as string, instruments[index]!.id]))
}

/** First day of each value of a key over the readings, in the order they come. */
function firstDays(readings: readonly DemoReading[], keyOf: (reading: DemoReading) => string) {
  const first = new Map<string, DemoReading>()
  for (const reading of readings) if (!first.has(keyOf(reading))) first.set(keyOf(reading), reading)
  return first
}

async function plantCampaigns(tx: Transaction, project: string, labs: ReadonlyMap<string, string>, readings: readonly DemoReading[]) {
  const sampleId = v7()
  await tx.insert(sample).values({ id: sampleId, project, ...setting.sample })
  const instruments = await plantInstruments(tx, labs)
  const campaigns = [...firstDays(readings, ({ lab: labName, campaign: name }) => campaignKey(labName, name))].map(([key, first]) => ({
    key,
    row: {
      id: v7(),
      project,
      lab: labs.get(first.lab)!,
      sample: sampleId,
      instrument: instruments.get(first.lab)!,
      name: first.campaign,
      clouds: 'on-heating' as const,
      ...setting.campaign,
      criterion: setting.campaign.criterion as typeof campaign.$inferInsert.criterion,
      rate: truth.labs[first.lab as LabName].rate,
      startedOn: first.day,
    },
  }))
  await tx.insert(campaign).values(campaigns.map(({ row }) => row))
  return new Map(campaigns.map(({ key, row }) => [key, row.id]))
}

async function plantBatches(tx: Transaction, project: string, campaigns: ReadonlyMap<string, string>, readings: readonly DemoReading[]) {
  const batches = [...firstDays(readings, ({ lab: labName, day }) => batchKey(labName, day))].map(([key, first]) => ({
    key,
    row: { id: v7(), project, campaign: campaigns.get(campaignKey(first.lab, first.campaign))!, label: first.day, measuredOn: first.day },
  }))
  await tx.insert(batch).values(batches.map(({ row }) => row))
  return new Map(batches.map(({ key, row }) => [key, row.id]))
}

/** Sample, stocks, instruments, campaigns and batches that the readings name. */
export async function plantPlaces(tx: Transaction, project: string, readings: readonly DemoReading[]): Promise<Places> {
  const labs = await labIds(tx)
  const stocks = await plantStocks(tx, project, labs)
  const campaigns = await plantCampaigns(tx, project, labs, readings)
  return { stocks, campaigns, batches: await plantBatches(tx, project, campaigns, readings) }
}
