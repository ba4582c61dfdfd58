/** What is written, apart from what it means: signs that stand for others, water of crystallization, blanks. */

const superscriptDigits = '⁰¹²³⁴⁵⁶⁷⁸⁹'

/** One way to write each sign: plain digits, SO4^2- for SO₄²⁻, · for every dot, no accents, no markup. */
export function tidy(text: string): string {
  return text
    .replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]*[⁺⁻]/g, charge => `^${[...charge].map(sign => superscriptDigits.includes(sign) ? superscriptDigits.indexOf(sign) : sign).join('')}`)
    .replace(/<\/?su[bp]>|[$_{}]|\\(?:ce|mathrm)/gi, '')
    .normalize('NFKC')
    .replace(/[‐‑‒–—−]/g, '-')
    .replace(/[•⋅∙‧・●]/g, '·')
    .replace(/\[/g, '(').replace(/\]/g, ')')
    .normalize('NFD').replace(/\p{M}/gu, '')
    .replace(/ø/gi, 'o').replace(/ß/g, 'ss')
    .replace(/\s+/g, ' ')
    .replace(/^[\s;:"'“”„‚‘«»]+|[\s.,;:*†‡"'“”‘»«]+$/g, '')
}

const blankWords = new Set([
  'blank', 'blk', 'blanc', 'blanco', 'blancosinsal', 'blindwert', 'leerwert', 'leerprobe', 'blindprobe', 'blindprove', 'blindprov', 'temoin',
  'water', 'purewater', 'milliqwater', 'milliq', 'diwater', 'deionisedwater', 'deionizedwater', 'distilledwater', 'wasser', 'reineswasser', 'reinstwasser',
  'eau', 'eaupure', 'agua', 'aguapura', 'vann', 'rentvann', 'h2o',
  'none', 'nosalt', 'noaddedsalt', 'withoutsalt', 'saltfree', 'nosaltadded', 'ohnesalz', 'salzfrei', 'keinsalz', 'ohne', 'keine', 'keines', 'sanssel', 'sinsal', 'utensalt', 'ingen', 'aucun', 'ninguno', 'ninguna',
  'buffer', 'bufferonly', 'onlybuffer', 'purebuffer', 'puffer', 'nurpuffer', 'tampon', 'tamponseul', '0', '0m', '0mm', 'zero', 'zerosalt',
])

/** What may stand beside a blank's name: 'Blank 2', 'blank A', 'water blank', 'blank run 3'. */
const besideBlank = /^(?:[a-z]|[a-z]?\d+|nr|no|run|rep|solution|sample|probe)$/

/** A solution without the salt: 'blank', 'Blank 2', 'no salt', 'Leerwert', 'H2O', '0'. */
export function isBlank(tidied: string): boolean {
  const text = tidied.toLowerCase()
  if (blankWords.has(text.replace(/[\s.,;:()#/-]/g, ''))) return true
  const words = text.split(/[^a-z0-9]+|(?<=[a-z]{3})(?=\d)/).filter(Boolean)
  const isNamed = (word: string) => word !== '0' && blankWords.has(word)
  return words.some(isNamed) && words.every(word => isNamed(word) || besideBlank.test(word))
}

const waterCounts: Readonly<Record<string, number>> = {
  hemi: 0.5, mono: 1, sesqui: 1.5, di: 2, tri: 3, tetra: 4, penta: 5, hexa: 6, heksa: 6, hepta: 7, octa: 8, okta: 8, nona: 9,
  deca: 10, deka: 10, undeca: 11, dodeca: 12, dodeka: 12,
}

/** `waters` is null where the text speaks of water without saying how much. */
export interface Crystal {
  rest: string
  waters: number | null
}

const number = String.raw`\d+(?:[.,]\d+)?`
const waterFormula = new RegExp(String.raw`^(.+?)(?:\s*([·.,*×x+(])\s*|\s+)(${number}|[xn])?\s*h2o\)?$`, 'i')
const waterName = new RegExp(String.raw`^(.+?)[\s,(-]*(${Object.keys(waterCounts).join('|')}|${number}|[xn])?[\s-]*(?<!chlor)h[yi]dr(?:ate?|ato|atado)\)?$`, 'i')
const withoutWater = /[\s,-]*\(?(?:anhydrous|anhydr\.|anhydrate?|anhydre|wasserfrei(?:es)?|vannfri(?:tt)?|anhidro)\)?[\s,-]*/i
const grade = /[\s,]+\(?(?:p\.? ?a|acs|puriss|[>≥]? ?(?:9\d|100)(?:[.,]\d+)? ?%)\)?$/i
const dissolved = /\s*\(?\baq\.?\)?$/i

function countWaters(given: string | undefined, isSaid: boolean): number | null {
  if (given === undefined) return isSaid ? 1 : null
  if (/^[xn]$/i.test(given)) return null
  return waterCounts[given.toLowerCase()] ?? Number(given.replace(',', '.'))
}

/** Parts a salt from its water, and from what says how pure it is: 'Na2SO4 x 10 H2O', 'NaClO4·H2O', 'sodium sulfate decahydrate', 'Natriumsulfat-Decahydrat'. */
export function withoutCrystalWater(tidied: string): Crystal {
  const text = tidied.replace(withoutWater, ' ').replace(dissolved, '').replace(grade, '').trim()
  const formula = waterFormula.exec(text)
  if (formula) {
    // 'NaClO4 x H2O' counts one; 'NaClO4·xH2O' and 'NaClO4 xH2O' leave it open.
    const isOpen = formula[2]?.toLowerCase() === 'x' && !/ x /i.test(text)
    return { rest: formula[1]!, waters: countWaters(formula[3], !isOpen) }
  }
  const name = waterName.exec(text)
  return name ? { rest: name[1]!, waters: countWaters(name[2], false) } : { rest: text, waters: 0 }
}
