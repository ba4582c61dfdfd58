import type { z } from 'zod'
import type { exportQuery } from '#shared/contracts/revisions'
import { engine } from '#shared/science/version'
import { asPerson } from '~~/server/database/client'
import { ServiceError } from '../errors'
import { exportedSeries, type Exported } from './exported'
import { constantLines, constantsTable, manyReadings, readingsTable, type Table } from './tables'
import { csv, latex, markdown, workbook } from './writers'

type Wanted = z.infer<typeof exportQuery>

/** A file as it is sent. */
export interface SentFile { name: string, mediaType: string, body: string | Buffer }

const mediaTypes: Record<Wanted['format'], string> = {
  csv: 'text/csv; charset=utf-8', xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', md: 'text/markdown; charset=utf-8', tex: 'application/x-tex; charset=utf-8',
}

/** What every file says of itself: where from, which revision, which engine, which day. */
function remarksOf(all: readonly Exported[]): string[] {
  const [only] = all
  const what = all.length === 1 ? `${only!.salt}; ${only!.lab}; ${only!.campaign}; revision ${only!.revision}` : `${all.length} series`
  return [`Anionary; ${only!.project}; ${what}; engine ${engine.version}; ${new Date().toISOString().slice(0, 10)}`]
}

async function fileOf(all: readonly Exported[], name: string, readings: () => Table, { format, of }: Wanted): Promise<SentFile> {
  if (all.length === 0) throw new ServiceError('not-found', 'Nothing is measured here yet, so there is nothing to take away.')
  const remarks = remarksOf(all)
  const body = {
    csv: () => csv(remarks, of === 'readings' ? readings() : constantsTable(all)),
    xlsx: () => workbook(remarks, { readings: readings(), constants: constantsTable(all) }),
    md: () => markdown(remarks, constantLines(all)),
    tex: () => latex(remarks, constantLines(all)),
  }[format]
  const part = format === 'csv' ? `-${of}` : ''
  return { name: `${name}${part}.${format}`, mediaType: mediaTypes[format], body: await body() }
}

/** Readings or constants of one series. @throws ServiceError 'not-found' where nothing is measured */
export async function exportSeries(who: string, id: string, wanted: Wanted): Promise<SentFile> {
  const all = await asPerson(who, tx => exportedSeries(tx, { series: id }))
  return fileOf(all, all[0] ? `${all[0].salt} ${all[0].lab} ${all[0].campaign} r${all[0].revision}` : '', () => readingsTable(all[0]!), wanted)
}

/** Readings or constants of every series of a project. @throws ServiceError 'not-found' where nothing is measured */
export async function exportProject(who: string, id: string, wanted: Wanted): Promise<SentFile> {
  const all = await asPerson(who, tx => exportedSeries(tx, { project: id }))
  return fileOf(all, all[0]?.project ?? '', () => manyReadings(all), wanted)
}
