/** The unit of every quantity that travels under a name, as it is printed. One place; names carry no unit suffix. */
export const units = {
  x: 'M',
  y: '°C',
  sd: 'K',
  T0: '°C',
  c: 'K M⁻¹',
  q: 'K M⁻²',
  Bmax: 'K',
  K: 'M⁻¹',
  h: '1',
  Kd: 'M',
  BmaxK: 'K M⁻¹',
  BmaxOverK: 'K M',
  initialSlope: 'K M⁻¹',
  curvature: 'K M⁻²',
  plateau: '°C',
  maximumConcentration: 'M',
  maximumShift: 'K',
  minimumConcentration: 'M',
  minimumShift: 'K',
  crossoverConcentration: 'M',
  residualStandardDeviation: 'K',
} as const

export type QuantityName = keyof typeof units
