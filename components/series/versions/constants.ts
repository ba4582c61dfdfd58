/** Constants of two fits beside each other. */
import type { Series } from '#shared/contracts/series'
import { concise } from '#shared/science/notation'
import { signed } from '~~/components/chart/rail/signed'

export interface ConstantPair {
  name: string
  unit: string
  values: [string, string]
  /** second less first, in standard errors of the first; null where there is no such number */
  shift: string | null
}

type Fit = Series['fit']

/** Every constant of either fit; the difference is given in standard errors of the first. */
export function constantPairs(first: Fit, second: Fit): ConstantPair[] {
  const names = [...new Set([...first?.parameters ?? [], ...second?.parameters ?? []].map(({ name }) => name))]
  return names.map((name) => {
    const [a, b] = [first, second].map(fit => fit?.parameters.find(parameter => parameter.name === name))
    const print = (one: typeof a) => one ? `${concise(one.estimate, one.standardError)}${one.fixed ? ' held' : ''}` : '—'
    const change = a?.standardError && a.estimate !== null && b && b.estimate !== null ? (b.estimate - a.estimate) / a.standardError : null
    return { name, unit: (a ?? b)!.unit, values: [print(a), print(b)], shift: change === null ? null : signed(change, 1) }
  })
}
