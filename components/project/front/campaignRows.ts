/** The campaigns of a project with their salts and how far each is. */
import type { ProjectFront } from '#shared/contracts/front'
import type { SeriesSummary } from '#shared/contracts/series'
import { hydrationOrder } from '#shared/science/chemistry/ions'
import { attentionOf, findingsOf } from '#shared/science/pooling/findings'
import { comparedOf } from '~~/components/project/overview/compared'
import { apartByCation } from '~~/components/project/overview/cations'
import { counted } from '~~/components/project/overview/words'

export interface SaltMark {
  series: string
  anion: string
  name: string
  state: 'fitted' | 'none' | 'look'
}

export interface CampaignRow {
  campaign: ProjectFront['campaigns'][number]
  salts: SaltMark[]
  /** readings, each blank once */
  readings: number
  state: string
  /** something asks for a look */
  isMarked: boolean
}

const stateWords: Record<SaltMark['state'], string> = { fitted: 'fitted', none: 'no fit', look: 'to look at' }

/** What a mark says to whoever cannot see it. */
export const saltLabel = ({ name, state }: SaltMark) => `${name}: ${stateWords[state]}`

export function campaignRows(campaigns: ProjectFront['campaigns'], all: readonly SeriesSummary[]): CampaignRow[] {
  const compared = apartByCation(all).map(comparedOf)
  const attention = attentionOf(compared, findingsOf(compared))
  return campaigns.map((campaign) => {
    const own = all.filter(one => one.campaign.id === campaign.id).sort((a, b) => hydrationOrder(b.salt.anion) - hydrationOrder(a.salt.anion))
    const salts = own.map(({ id, salt, fit }): SaltMark => ({
      series: id, anion: salt.anion, name: salt.name, state: !fit ? 'none' : attention.has(id) ? 'look' : 'fitted',
    }))
    const readings = new Set(own.flatMap(one => one.readings.map(({ id }) => id))).size
    return { campaign, salts, readings, ...stateOf(campaign, salts, readings) }
  })
}

function stateOf({ batchesWithoutBlanks }: ProjectFront['campaigns'][number], salts: readonly SaltMark[], readings: number): Pick<CampaignRow, 'state' | 'isMarked'> {
  const look = salts.filter(({ state }) => state === 'look').length
  const unfitted = salts.filter(({ state }) => state === 'none').length
  if (readings === 0) return { state: 'no readings yet', isMarked: false }
  if (batchesWithoutBlanks.length > 0) return { state: `no blanks: ${batchesWithoutBlanks.join(', ')}`, isMarked: true }
  if (look > 0) return { state: `${look} to look at`, isMarked: true }
  return { state: unfitted > 0 ? `${counted(unfitted, 'salt')} without a fit` : 'complete', isMarked: false }
}
