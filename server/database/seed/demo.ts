import { v7 } from 'uuid'
import { sodiumSalts } from '#shared/science/chemistry/salts'
import { fromTable } from '~~/data-seeds/demo/csv'
import type { DemoReading } from '~~/data-seeds/demo/generate'
import table from '~~/data-seeds/demo/readings.tsv'
import setting from '~~/data-seeds/demo/setting.json'
import truth from '~~/data-seeds/demo/truth.json'
import type { Transaction } from '../client'
import { auditEvent, batchRevision, batchRevisionReading, reading, revisionReading, series, seriesRevision } from '../schema'
import { historyOf, type KnownReading, type PlannedRevision } from './demo-history'
import { batchKey, campaignKey, labNames, plantPlaces, stockKey, type LabName, type Places } from './demo-places'
import { peopleByEmail, projectByName, type Seed } from './seeding'

interface SeriesPlan {
  id: string
  row: typeof series.$inferInsert
  revisions: PlannedRevision[]
}

const campaignNames = ['spring', 'autumn']

/** Every salt in every campaign has a series, also where nobody has measured yet. */
function planSeries(project: string, places: Places, readings: readonly DemoReading[]): SeriesPlan[] {
  return labNames.flatMap(labName => campaignNames.flatMap(campaign => sodiumSalts.map((salt) => {
    const known = readings
      .filter(row => row.lab === labName && row.campaign === campaign && row.anion === salt.anion)
      .map((row): KnownReading => ({ id: v7(), row }))
    const id = v7()
    return {
      id,
      row: {
        id,
        project,
        campaign: places.campaigns.get(campaignKey(labName, campaign))!,
        stock: places.stocks.get(stockKey(labName, salt.anion))!,
        saltFormula: salt.formula,
        saltName: salt.name,
        anion: salt.anion,
        cation: salt.cation,
      },
      revisions: historyOf(known, setting.labs[labName].recordedBy),
    }
  })))
}

/** A row as the table of readings holds it. The standard uncertainty of a mean is its replicates' scatter over √n. */
function readingRow(project: string, places: Places, { id, row, replaces }: KnownReading, plan: SeriesPlan | null) {
  return {
    id,
    project,
    series: plan?.id ?? null,
    batch: places.batches.get(batchKey(row.lab, row.day))!,
    concentration: row.concentration,
    composition: plan ? [{ salt: plan.row.saltFormula, value: row.concentration, unit: 'mol/L' as const, varied: true }] : [],
    value: row.value,
    sd: row.sdOfReplicates / Math.sqrt(row.n),
    sdGiven: row.sdOfReplicates,
    sdGivenMeaning: 'sd-of-replicates' as const,
    n: row.n,
    direction: 'heating' as const,
    rate: truth.labs[row.lab as LabName].rate,
    note: row.note || null,
    origin: { kind: 'demonstration' as const },
    ...(replaces && { replaces: replaces.id, changeReason: 'typing-error' as const, changeWords: replaces.words }),
  }
}

async function plantRevisions(tx: Transaction, project: string, plan: SeriesPlan, people: ReadonlyMap<string, string>) {
  for (const [index, revision] of plan.revisions.entries()) {
    const id = v7()
    const by = people.get(revision.by)!
    await tx.insert(seriesRevision).values({ id, project, series: plan.id, number: index + 1, summary: revision.summary, madeBy: by, createdAt: revision.at })
    await tx.insert(auditEvent).values({
      person: by, project, action: 'revised', subject: 'series', subjectId: plan.id, at: revision.at,
      values: { number: index + 1, summary: revision.summary, ...revision.values },
    })
    await tx.insert(revisionReading).values(revision.readings.map(({ reading: { id: readingId, row }, isSetAside }, place) => ({
      project,
      revision: id,
      reading: readingId,
      number: place + 1,
      ...(isSetAside ? { setAsideReason: row.setAsideReason, setAsideBy: by, setAsideAt: revision.at } : {}),
    })))
  }
}

/** The blanks of each day as the first revision of its batch. */
async function plantBlanks(tx: Transaction, project: string, places: Places, blanks: readonly KnownReading[], people: ReadonlyMap<string, string>) {
  for (const [key, batch] of places.batches) {
    const ofBatch = blanks.filter(({ row }) => batchKey(row.lab, row.day) === key)
    const first = ofBatch[0]?.row
    if (!first) continue
    const id = v7()
    await tx.insert(batchRevision).values({
      id, project, batch, number: 1, summary: `${ofBatch.length} blanks typed in from the lab book`,
      madeBy: people.get(setting.labs[first.lab as LabName].recordedBy)!, createdAt: new Date(`${first.day}T16:00:00Z`),
    })
    await tx.insert(batchRevisionReading).values(ofBatch.map((blank, place) => ({ project, revision: id, reading: blank.id, number: place + 1 })))
  }
}

/** Every reading that any revision holds, once. */
function readingsOf(plan: SeriesPlan): KnownReading[] {
  return [...new Map(plan.revisions.flatMap(revision => revision.readings.map(({ reading: known }) => [known.id, known] as const))).values()]
}

/** The invented measurements of the demonstration, with their history. */
export const demo: Seed = {
  name: 'demo',
  async plant(tx) {
    const project = await projectByName(tx, 'Shadehouse gel')
    const readings = fromTable(table)
    const places = await plantPlaces(tx, project, readings)
    const plans = planSeries(project, places, readings)
    const emails = [...new Set(plans.flatMap(plan => plan.revisions.map(revision => revision.by)))]
    const people = await peopleByEmail(tx, emails)

    await tx.insert(series).values(plans.map(plan => plan.row))
    const blanks = readings.filter(row => !row.anion).map((row): KnownReading => ({ id: v7(), row }))
    await tx.insert(reading).values([
      ...blanks.map(known => readingRow(project, places, known, null)),
      ...plans.flatMap(plan => readingsOf(plan).map(known => readingRow(project, places, known, plan))),
    ])
    await plantBlanks(tx, project, places, blanks, people)
    for (const plan of plans) await plantRevisions(tx, project, plan, people)
  },
}
