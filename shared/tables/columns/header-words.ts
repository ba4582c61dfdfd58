import type { ColumnMeaning, TableColumn } from '../types'

type Direction = NonNullable<TableColumn['direction']>

/** Headings by what they mean, in English, German, Norwegian, French and Spanish, folded (small letters, no accents). The first that fits holds. */
const meanings: readonly (readonly [ColumnMeaning, RegExp])[] = [
  ['kept', /^(?!.*(?:cloud|trub|lcst|temp|\bt ?cp)).*(?:polymer|pnipam)|^ionic|ionenst|ionestyrke|force ionique|fuerza ionica|\brel\b|relativ|\brsd\b|\bcv\b|^(?:u|sd?|err|error|unc|fehler|uncertainty|unsicherheit)\b.*%|\bshift\b|verschiebung|differen|\bstock\b|stamm|mass(?:e|a)?\b|weight|gewicht|volum|^time\b|^zeit|^tid\b|^temps\b|^tiempo|^hora\b|absorb|transmi|wellenlange|wavelength|^(?:no|nr|#|id|index|entry|row|zeile|file|datei|sample id|operator|bearbeiter)$/],
  // "Tcp ± sd" holds both, cell by cell.
  ['cloud-point', /^t.*\w ?(?:±|\+\/?-) ?\w|^cloud.*(?:±|\+\/?-) ?\w/],
  ['set-aside', /^set aside|^excluded?\b|ausgeschlossen|^exclu|utelatt|^omit|verworfen/],
  ['limit', /^limit|^qualifier|^censor|^grenze$|^grense$|^limite$/],
  ['pH', /^ph\b/],
  ['rate', /\brate\b|heizrate|kuhlrate|\bvitesse\b|velocidad|hastighet|\bramp(?:e)?\b/],
  ['samples', /^n$|^n [a-z]*$|\bsamples\b|replicates|^(?:number|no|nr|num) of|^anzahl|^antall|^nombre d(?:e |')(?:mes|essai|rep|ech)|^numero de (?:m|r|e)|^count$|^proben$|^prover$|messungen|^reps$/],
  ['replicate', /^rep$|^rep ?(?:no|nr|#)|^replicate|^replikat|^wiederholung|^parallel+|^essai|^repetition|^repeticion|^replica|^aliquot|^triplicate|^vial$/],
  ['uncertainty', /±|\+\/?-|^(?:d|delta |δ|σ|u|s|su|u c|uc|se|sem|sd|std|stdev|stddev|stabw|stdabw|sigma|esd|err|error|fehler|erreur|feil|incert|unc|dev|dt|δt)$|^(?:u|s|σ|d|δ|se|sd|sem)\s?\(|(?:^|[ (])(?:sd|se|sem|std|stdev|std dev|stdabw|stabw|stderr|std err|err|error|unc|sigma)(?:$|[ )])|uncertaint|deviation|standard error|abweichung|unsicherheit|messfehler|ecart|incertitude|erreur|desviacion|incertidumbre|usikkerhet|avvik|error estandar/],
  ['concentration', /conc|konz|konsentrasjon|^kons\b|molarit|molalit|^c$|^c ?[([]|^c [a-z0-9]+$|^\[.*\]$|^m$|^b$|^x$/],
  ['batch', /batch|^charge$|^charge\b|^lot\b|^lote$|^parti|messreihe|^serie$|^series$|^run\b|^lauf$|^set$|^tanda$/],
  ['date', /^date|datum|^dato|fecha|^measured(?: on| at)?$|^gemessen(?: am)?$|^malt(?: den)?$|mesure le|medido|^day$|^tag$|^dag$|^jour$|^dia$|^when$/],
  ['direction', /^direction|richtung|^retning|^sens\b|direccion|^branch|^scan$|^mode$|up ?\/ ?down|heating ?\/ ?cooling|^zweig$/],
  ['note', /^notes?\b|remar[kq]|comment|kommentar|bemerkung|anmerkung|^notiz|merknad|observ|^notas?\b|^info|^hinweis/],
  ['cloud-point', /cloud(?!y)|trubung|turbidez|turbidity|turbidit|enturbiamiento|trouble|punto de nube|uklar|skypunkt|blakning|\blcst\b|\bucst\b|temp|^t$|^t ?\d{1,2}$|^t[ (]|^t-|^tcp|^tcloud|^cp$|^cp |^tc$|^tph|^tm$|^tt$|^y$|^θ$|^ϑ$|transition|ubergang|demix/],
  ['salt', /salt|salz|^sels?\b|^sal$|^sales$|^anion|^ion$|^compound|verbindung|^stoff|electrolyte|elektrolyt|^additiv|^zusatz|^formula|^formel|^formule/],
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
const summary = /^(?:the )?(?:mean|average|avg|median|mittel(?:wert)?|durchschnitt|moyenne|moy|gjennomsnitt|snitt|middel(?:verdi)?|media|promedio|mediana|sum|summe|somme|suma|total|totalt|gesamt|min(?:imum)?|max(?:imum)?|sd|std|stdev|stabw|stdabw|standard deviation|standardabweichung|standardavvik|ecart[- ]type|desviacion estandar|rsd|cv|slope|steigung|pente|intercept|range)\b\.?(?:\s*(?:±|\+\/-).*| of .*| t.*)?\s*:?$/

export function isSummaryWord(folded: string): boolean {
  return summary.test(folded)
}

const doubt = /\?|bubble|outlier|drift|leak|spill|\bbad\b|suspect|contamin|repeat|discard|precipit|broken|failed|doubt|blase|ausrei|verworf|undicht|niederschlag|zweifel|wiederhol|boble|utstikker|lekk|bulle|aberrant|fuite|burbuja|atipic|fuga/

/** A remark that may be a reason to set its reading aside. */
export function isDoubt(folded: string): boolean {
  return doubt.test(folded)
}
