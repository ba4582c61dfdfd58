import { v5 } from 'uuid'
import type { SeriesSummary } from '#shared/contracts/series'
import { sodiumSalts } from '#shared/science/chemistry/salts'
import { ScienceError } from '#shared/science/errors'
import { fit, supportOf, type FitResult, type Point } from '#shared/science/fitting'
import { generateReadings, type DemoReading } from '~~/data-seeds/demo/generate'

const namespace = '6ba7b811-9dad-11d1-80b4-00c04fd430c8'
const idOf = (...names: (string | number)[]) => v5(names.join(' '), namespace)

function bestFit(points: Point[]): FitResult | null {
  try {
    const request = { points, weighting: 'replicates' as const }
    const line = fit({ ...request, model: 'linear' })
    const binding = fit({ ...request, model: 'linear-langmuir' })
    return supportOf(request, line, binding).verdict === 'supported' ? binding : line
  }
  catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

const pointOf = (row: DemoReading) => ({ x: row.concentration, y: row.value, n: row.n })
const agedMonths = 14

/** The demonstration as the project's series route gives it, without a database. */
export function demoSummaries(): SeriesSummary[] {
  const rows = generateReadings()
  return ['Norrvik', 'Ostrel', 'Quaymere'].flatMap(lab => ['spring', 'autumn'].flatMap(campaign => sodiumSalts.map((salt): SeriesSummary => {
    const own = rows.filter(row => row.lab === lab && row.campaign === campaign && row.anion === salt.anion)
    const blanks = rows.filter(row => row.lab === lab && !row.anion && own.some(reading => reading.day === row.day))
    const used = [...blanks, ...own].filter(row => !row.setAsideReason)
    // Fewer than four places on the axis do not carry the model with a binding term.
    const found = new Set(used.map(row => row.concentration)).size < 4 ? null : bestFit(used.map(pointOf))
    return {
      id: idOf(lab, campaign, salt.formula),
      salt,
      campaign: { id: idOf(lab, campaign), name: campaign, lab: { id: idOf(lab), name: lab }, clouds: 'on-heating' },
      stock: { id: `stock of ${salt.formula}`, lot: salt.formula, madeOn: null, ageAtUse: lab === 'Quaymere' && salt.anion === 'I^-' ? agedMonths : 0 },
      revision: own.length > 0 ? 1 : null,
      readings: [...blanks, ...own].map((row, index) => ({
        id: row.anion ? idOf(lab, campaign, row.anion, index) : idOf(lab, row.day, index),
        x: row.concentration,
        y: row.value,
        limit: 'exact',
        setAside: row.setAsideReason !== '',
        blank: row.anion === '',
      })),
      fit: found && { id: idOf('fit', lab, campaign, salt.formula), ...found },
    }
  })))
}
