/** What waits for the reader of a project, in words. */
import type { ProjectFront } from '#shared/contracts/front'
import { plainFormula } from '#shared/science/chemistry/ions'
import { counted, listed } from '~~/components/project/overview/words'

export interface Waiting {
  key: string
  what: string
  detail: string
  link: { to: string, words: string }
}

const placeOf = ({ name, lab }: { name: string, lab: { name: string } }) => `${lab.name}, ${name}`
const mostMissing = 3

/** The reader's own unfinished work first, then what the campaigns lack; nobody is asked for what they may not change. */
export function waitingFor({ waits, campaigns }: Pick<ProjectFront, 'waits' | 'campaigns'>, project: string, canEdit: boolean): Waiting[] {
  const place = `/projects/${project}`
  const imports = waits.imports.map(({ id, name, campaign }): Waiting => ({
    key: id, what: `Decide the import of ${name}`, detail: placeOf(campaign), link: { to: `${place}/import/${id}`, words: 'Go on' },
  }))
  const drafts = waits.drafts.map(({ series, salt, campaign }): Waiting => ({
    key: series, what: `Keep or drop what you typed in ${plainFormula(salt.formula)}`, detail: placeOf(campaign), link: { to: `${place}/series/${series}`, words: 'Open the series' },
  }))
  if (!canEdit) return [...imports, ...drafts]
  const blanks = campaigns.filter(one => one.batchesWithoutBlanks.length > 0).map((one): Waiting => ({
    key: `blanks ${one.id}`, what: 'Measure blanks', detail: `${placeOf(one)}: none in ${listed(one.batchesWithoutBlanks)}`, link: { to: `${place}/campaigns/${one.id}`, words: 'Open the campaign' },
  }))
  return [...imports, ...drafts, ...blanks, ...reportsOf(campaigns, place)]
}

/** Campaigns that lack the same are told together. */
function reportsOf(campaigns: ProjectFront['campaigns'], place: string): Waiting[] {
  const byLack = new Map<string, ProjectFront['campaigns']>()
  for (const one of campaigns.filter(({ missing }) => missing.length > 0)) {
    const key = one.missing.join('\n')
    byLack.set(key, [...byLack.get(key) ?? [], one])
  }
  return [...byLack.values()].map((group): Waiting => {
    const [first] = group as [ProjectFront['campaigns'][number]]
    const { missing } = first
    const where = group.length === 1 ? placeOf(first) : `${counted(group.length, 'campaign')}, ${placeOf(first)} among them`
    return {
      key: `report ${first.id}`, what: `State ${counted(missing.length, 'thing')} for a report`,
      detail: `${where}: ${missing.slice(0, mostMissing).join(', ')}${missing.length > mostMissing ? ' …' : ''}`, link: { to: `${place}/campaigns/${first.id}`, words: 'Open the campaign' },
    }
  })
}
