import { seededRandom, type Random } from '#shared/science/random'
import design from './design.json'
import truth from './truth.json'

/** A row of readings.csv; a blank has no anion. Concentration in mol/L, value in °C, sd of replicates in K. */
export interface DemoReading {
  lab: string
  campaign: string
  day: string
  anion: string
  concentration: number
  value: number
  n: number
  sdOfReplicates: number
  note: string
  setAsideReason: string
  setAsideBy: string
  setAsideOn: string
}

interface Constants { c: number, Bmax?: number, K?: number }
interface Place { lab: string, campaign: string, anion: string }
type Exception = Place & { concentrations?: number[], ownDay?: string }

const anions: Record<string, Constants> = truth.anions
const labs: Record<string, { thermometer: number, rate: number }> = truth.labs
const plans: Record<string, Record<string, number[]>> = design.concentrations
const exceptions: Exception[] = design.exceptions

const isAt = (place: Place) => (other: Place) => other.lab === place.lab && other.campaign === place.campaign && other.anion === place.anion
const round = (value: number, digits: number) => Number(value.toFixed(digits))

/** Cloud point that the invented polymer truly has [°C] at a true concentration [mol/L]. */
export function trueCloudPoint(anion: string, concentration: number): number {
  const { c, Bmax = 0, K = 0 } = anions[anion]!
  return truth.T0 + c * concentration + Bmax * K * concentration / (1 + K * concentration)
}

function concentrationsOf(place: Place): number[] {
  const exception = exceptions.find(isAt(place))
  return exception?.concentrations ?? (plans[place.anion] ?? plans.weakly!)[place.campaign]!
}

/** What a lab's thermometer and heating rate add to every reading [K]. */
function labShift(lab: string): number {
  const { thermometer, rate } = labs[lab]!
  return thermometer + truth.lag.minutes * (rate - truth.lag.referenceRate)
}

/** True concentration over the labelled one, for each stock of a lab. */
function drawStocks(random: Random): Map<string, number> {
  const stocks = Object.keys(labs).flatMap(lab => Object.keys(anions).map((anion): [string, number] => {
    const aged = truth.agedStocks.find(stock => stock.lab === lab && stock.anion === anion)?.fraction ?? 1
    return [`${lab} ${anion}`, aged * (1 + truth.noise.stock * random.normal())]
  }))
  return new Map(stocks)
}

/** Mean and standard deviation of replicates about a temperature, as a person would write them down. */
function measure(random: Random, temperature: number, n: number) {
  const values = Array.from({ length: n }, () => temperature + truth.noise.replicate * random.normal())
  const mean = values.reduce((sum, value) => sum + value, 0) / n
  const sd = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1))
  return { value: round(mean, 2), sdOfReplicates: round(sd, 3) }
}

function remarks(place: Place, concentration: number) {
  const matches = (other: Place & { concentration: number }) => isAt(place)(other) && other.concentration === concentration
  const aside = design.setAside.find(matches)
  return {
    error: aside?.error ?? 0,
    note: design.notes.find(matches)?.note ?? '',
    setAsideReason: aside?.reason ?? '',
    setAsideBy: aside?.by ?? '',
    setAsideOn: aside?.on ?? '',
  }
}

type Campaign = typeof design.campaigns[number]

function readSeries(random: Random, stocks: ReadonlyMap<string, number>, campaign: Campaign, place: Place, day: string, dayShift: number): DemoReading[] {
  const stock = stocks.get(`${place.lab} ${place.anion}`)!
  return concentrationsOf(place).map((concentration) => {
    const { error, ...remark } = remarks(place, concentration)
    const trueConcentration = concentration * stock * (1 + truth.noise.pipetting * random.normal())
    const temperature = trueCloudPoint(place.anion, trueConcentration) + labShift(place.lab) + dayShift + error
    return { ...place, day, concentration, n: campaign.replicates, ...measure(random, temperature, campaign.replicates), ...remark }
  })
}

function readBlanks(random: Random, lab: string, campaign: Campaign, day: string, dayShift: number, count: number): DemoReading[] {
  return Array.from({ length: count }, () => ({
    lab,
    campaign: campaign.name,
    day,
    anion: '',
    concentration: 0,
    n: campaign.replicates,
    ...measure(random, truth.T0 + labShift(lab) + dayShift, campaign.replicates),
    note: '',
    setAsideReason: '',
    setAsideBy: '',
    setAsideOn: '',
  }))
}

/** Every reading of the demonstration, drawn from truth.json by the plan of design.json; the same on every run. */
export function generateReadings(): DemoReading[] {
  const random = seededRandom(truth.seed)
  const stocks = drawStocks(random)
  return Object.keys(labs).flatMap(lab => design.campaigns.flatMap(campaign => campaign.days.flatMap((day, index) => {
    const dayShift = truth.noise.day * random.normal()
    const blanks = readBlanks(random, lab, campaign, day, dayShift, campaign.blanks)
    const series = design.days[index]!.flatMap((anion) => {
      const place = { lab, campaign: campaign.name, anion }
      return readSeries(random, stocks, campaign, place, exceptions.find(isAt(place))?.ownDay ?? day, dayShift)
    })
    return [...blanks, ...series]
  })))
}
