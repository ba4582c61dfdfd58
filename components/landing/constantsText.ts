import type { FitResult } from '#shared/science/fitting/types'

/** Constants as tab-separated text for a spreadsheet, all digits kept, with what they were made by. */
export function constantsText(fit: FitResult): string {
  const level = fit.parameters.find(parameter => parameter.interval)?.interval?.level ?? 0.95
  const percent = Math.round(100 * level)
  const cell = (value: number | null) => value === null ? '' : String(value)
  const lines = [
    ['constant', 'estimate', 'standard error', `lower ${percent} %`, `upper ${percent} %`, 'unit'],
    ...fit.parameters.map(({ name, estimate, standardError, interval, unit }) =>
      [name, cell(estimate), cell(standardError), cell(interval?.lower ?? null), cell(interval?.upper ?? null), unit]),
    ...fit.derived.map(({ name, estimate, standardError, unit }) => [name, cell(estimate), cell(standardError), '', '', unit]),
    ['model', fit.model],
    ['readings', String(fit.n)],
    ['residual standard deviation', cell(fit.residualStandardDeviation), '', '', '', fit.weighting === 'sd' ? 'stated standard uncertainties' : 'K'],
    ['engine', `${fit.engine.name} ${fit.engine.version}`],
  ]
  return `${lines.map(line => line.join('\t')).join('\n')}\n`
}
