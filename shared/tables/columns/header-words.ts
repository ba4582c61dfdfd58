import type { ColumnMeaning, TableColumn } from '../types'

type Direction = NonNullable<TableColumn['direction']>

type Heading = readonly [ColumnMeaning, RegExp]

const means = (meaning: ColumnMeaning, ...words: readonly RegExp[]): Heading => [meaning, new RegExp(words.map(({ source }) => source).join('|'))]

/**
 * Headings by what they mean, folded (small letters, no accents); the first that fits holds.
 * Within a meaning: signs and symbols, then English, German, Norwegian, French and Spanish.
 */
const meanings: readonly Heading[] = [
  means('kept',
    /^(?!.*(?:cloud|trub|lcst|temp|\bt ?cp)).*(?:polymer|pnipam)/,
    /^ionic|ionenst|ionestyrke|force ionique|fuerza ionica/,
    /\brel\b|relativ|\brsd\b|\bcv\b|^(?:u|sd?|err|error|unc|fehler|uncertainty|unsicherheit)\b.*%/,
    /\bshift\b|verschiebung|differen|\bstock\b|stamm|mass(?:e|a)?\b|weight|gewicht|volum/,
    /^time\b|^zeit|^tid\b|^temps\b|^tiempo|^hora\b|absorb|transmi|wavelength|wellenlange/,
    /^(?:no|nr|#|id|index|entry|row|zeile|file|datei|sample id|operator|bearbeiter)$/),
  // "Tcp ± sd" holds both, cell by cell.
  means('cloud-point', /^t.*\w ?(?:±|\+\/?-) ?\w|^cloud.*(?:±|\+\/?-) ?\w/),
  means('set-aside', /^set aside|^excluded?\b|^omit|ausgeschlossen|verworfen|utelatt|^exclu/),
  means('limit', /^limit|^qualifier|^censor|^grenze$|^grense$|^limite$/),
  means('pH', /^ph\b/),
  means('rate', /\brate\b|\bramp(?:e)?\b|heizrate|kuhlrate|hastighet|\bvitesse\b|velocidad/),
  means('samples',
    /^n$|^n [a-z]*$|^count$|^reps$|\bsamples\b|replicates|^(?:number|no|nr|num) of/,
    /^anzahl|^proben$|messungen|^antall|^prover$|^nombre d(?:e |')(?:mes|essai|rep|ech)|^numero de (?:m|r|e)/),
  means('replicate',
    /^rep$|^rep ?(?:no|nr|#)|^replicate|^parallel+|^aliquot|^triplicate|^vial$/,
    /^replikat|^wiederholung|^essai|^repetition|^repeticion|^replica/),
  means('uncertainty',
    /±|\+\/?-/,
    /^(?:d|dt|δt|delta |δ|σ|u|s|su|u c|uc|se|sem|sd|std|stdev|stddev|stabw|stdabw|sigma|esd|err|error|incert|unc|dev)$/,
    /^(?:u|s|σ|d|δ|se|sd|sem)\s?\(/,
    /(?:^|[ (])(?:sd|se|sem|std|stdev|std dev|stdabw|stabw|stderr|std err|err|error|unc|sigma)(?:$|[ )])/,
    /uncertaint|deviation|standard error|abweichung|unsicherheit|messfehler|^fehler$|usikkerhet|avvik|^feil$/,
    /ecart|incertitude|erreur|desviacion|incertidumbre|error estandar/),
  means('concentration',
    /^c$|^c ?[([]|^c [a-z0-9]+$|^\[.*\]$|^m$|^b$|^x$/,
    /conc|molarit|molalit|konz|konsentrasjon|^kons\b/),
  means('batch', /batch|^lot\b|^run\b|^set$|^series$|^charge\b|messreihe|^lauf$|^parti|^serie$|^lote$|^tanda$/),
  means('date',
    /^date|^measured(?: on| at)?$|^day$|^when$|datum|^gemessen(?: am)?$|^tag$/,
    /^dato|^malt(?: den)?$|^dag$|mesure le|^jour$|fecha|medido|^dia$/),
  means('direction', /^direction|^branch|^scan$|^mode$|up ?\/ ?down|heating ?\/ ?cooling|richtung|^zweig$|^retning|^sens\b|direccion/),
  means('note', /^notes?\b|^info|remar[kq]|comment|observ|kommentar|bemerkung|anmerkung|^notiz|^hinweis|merknad|^notas?\b/),
  means('cloud-point',
    /^t$|^t ?\d{1,2}$|^t[ (]|^t-|^tcp|^tcloud|^cp$|^cp |^tc$|^tph|^tm$|^tt$|^y$|^θ$|^ϑ$|\blcst\b|\bucst\b/,
    /cloud(?!y)|turbidity|temp|transition|demix|trubung|ubergang|uklar|skypunkt|blakning/,
    /trouble|turbidit|turbidez|enturbiamiento|punto de nube/),
  means('salt',
    /salt|^anion|^ion$|^compound|electrolyte|^additiv|^formula/,
    /salz|verbindung|elektrolyt|^zusatz|^stoff|^formel|^sels?\b|^formule|^sal$|^sales$/),
]

/** @param name folded, without its unit */
export function meaningOf(name: string): ColumnMeaning | null {
  if (name === '') return null
  return meanings.find(([, pattern]) => pattern.test(name))?.[0] ?? null
}

const directionWords: readonly (readonly [Direction, RegExp])[] = [
  ['cooling', /\bcool(?:ing)?\b|\bdn\b|\bdown\b|kuhl|kjol|refroid|enfria|\bab\b|↓|\bdownscan\b|avkjol/],
  ['heating', /\bheat(?:ing)?\b|\bup\b|heiz|erwarm|oppvarm|chauff|calent|\bauf\b|↑|\bupscan\b/],
]

/** The direction of temperature that a heading or a cell names. */
export function directionOf(folded: string): Direction | null {
  return directionWords.find(([, pattern]) => pattern.test(folded))?.[0] ?? null
}

export type UncertaintyWord = { meaning: NonNullable<TableColumn['uncertaintyMeaning']>, isCertain: boolean }

const ofReplicates = /\bsd\b|\bstd\b|stdev|std dev|standard deviation|abweichung|stabw|stdabw|^s$|^s ?\(|^σ|sigma|ecart|desviacion|avvik/
const standardUncertainty = /^su$|^u$|^u ?[c(]|\bsem?\b|std ?err|standard error|error estandar|unsicherheit|uncertaint|incertitude|incertidumbre|usikkerhet|^unc\b|^esd$/

/** What the heading of an uncertainty says it holds; null: it does not say. Only "standard uncertainty" in full leaves no doubt. */
export function uncertaintyWordOf(name: string): UncertaintyWord | null {
  // Expanded uncertainties are neither.
  if (/expanded|erweitert|\bk ?= ?[23]|95/.test(name)) return null
  if (/\bstandard uncertainty\b|standardunsicherheit/.test(name)) return { meaning: 'standard-uncertainty', isCertain: true }
  if (standardUncertainty.test(name)) return { meaning: 'standard-uncertainty', isCertain: false }
  return ofReplicates.test(name) ? { meaning: 'sd-of-replicates', isCertain: false } : null
}

/** Headings and cells that name a mean of the rest, in the same five languages. */
const summaryWords = [
  'mean', 'average', 'avg', 'median', 'mittel(?:wert)?', 'durchschnitt', 'gjennomsnitt', 'snitt', 'middel(?:verdi)?', 'moyenne', 'moy', 'media', 'promedio', 'mediana',
  'sum', 'total', 'summe', 'gesamt', 'totalt', 'somme', 'suma', 'min(?:imum)?', 'max(?:imum)?', 'range',
  'sd', 'std', 'stdev', 'stabw', 'stdabw', 'standard deviation', 'standardabweichung', 'standardavvik', 'ecart[- ]type', 'desviacion estandar', 'rsd', 'cv',
  'slope', 'intercept', 'steigung', 'pente',
]
const summary = new RegExp(`^(?:the )?(?:${summaryWords.join('|')})\\b\\.?(?:\\s*(?:±|\\+/-).*| of .*| t.*)?\\s*:?$`)

export function isSummaryWord(folded: string): boolean {
  return summary.test(folded)
}

const doubt = /\?|bubble|outlier|drift|leak|spill|\bbad\b|suspect|contamin|repeat|discard|precipit|broken|failed|doubt|blase|ausrei|verworf|undicht|niederschlag|zweifel|wiederhol|boble|utstikker|lekk|bulle|aberrant|fuite|burbuja|atipic|fuga/

/** A remark that may be a reason to set its reading aside. */
export function isDoubt(folded: string): boolean {
  return doubt.test(folded)
}
