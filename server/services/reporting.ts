import type { Instrument, Sample } from '#shared/contracts/materials'
import type { campaign } from '~~/server/database/schema'

/** What a good report of cloud points states (common practice), in words, as far as this campaign does not state it yet. */
export function missingFrom(head: typeof campaign.$inferSelect, sample: Sample | null, instrument: Instrument | null): string[] {
  const wanted: [words: string, isStated: unknown][] = [
    ['the polymer sample', sample],
    ['molar mass and how it was found', sample && (sample.numberMeanMass ?? sample.weightMeanMass) && sample.massMethod],
    ['dispersity', sample?.dispersity],
    ['end groups', sample?.endGroups],
    ['tacticity', sample?.tacticity],
    ['polymer concentration', head.polymerConcentration],
    ['criterion of the cloud point', head.criterion],
    ['heating rate', head.rate],
    ['hold time', head.hold !== null],
    ['what a replicate is', head.replicateKind],
    ['pH', head.ph !== null],
    ['the instrument', instrument],
    ['path length of the cell', instrument?.kind === 'by-eye' || instrument?.pathLength],
    ['wavelength', instrument?.kind === 'by-eye' || instrument?.wavelength],
    ['where the thermometer sits', instrument?.probePlace],
    ['date of the calibration', instrument?.calibratedOn],
  ]
  return wanted.filter(([, isStated]) => !isStated).map(([words]) => words)
}
