/** What the reading library does not tell of a sheet: hidden rows, merged ranges, formulas. Rows and columns count from 0. */
export interface SheetFacts {
  hidden: Set<number>
  merges: { top: number, left: number, bottom: number, right: number }[]
  /** 'row:column' → formula as written */
  formulas: Map<string, string>
}

const nothing = (): SheetFacts => ({ hidden: new Set(), merges: [], formulas: new Map() })
const attribute = (tag: string, name: string) => new RegExp(`\\b${name}="([^"]*)"`).exec(tag)?.[1]
const entities: Readonly<Record<string, string>> = { lt: '<', gt: '>', amp: '&', quot: '"', apos: '\'' }
const unescaped = (text: string) => text.replace(/&(lt|gt|amp|quot|apos);/g, (_, name: string) => entities[name]!)

/** B3 → row 2, column 1. */
function placeOf(reference: string): { row: number, column: number } | null {
  const [, letters, digits] = /^([A-Z]{1,3})(\d+)$/.exec(reference) ?? []
  if (!letters || !digits) return null
  const column = [...letters].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0) - 1
  return { row: Number(digits) - 1, column }
}

/** The part of the workbook that holds a sheet of this name, by the workbook's own table of relations. */
function sheetText(parts: ReadonlyMap<string, string>, name: string): string | undefined {
  const sheets = parts.get('xl/workbook.xml')?.match(/<sheet\b[^>]*>/g) ?? []
  const id = sheets.flatMap(tag => unescaped(attribute(tag, 'name') ?? '') === name ? attribute(tag, 'r:id') ?? [] : [])[0]
  const relations = parts.get('xl/_rels/workbook.xml.rels')?.match(/<Relationship\b[^>]*>/g) ?? []
  const target = relations.flatMap(tag => attribute(tag, 'Id') === id ? attribute(tag, 'Target') ?? [] : [])[0]
  return target && parts.get(target.startsWith('/') ? target.slice(1) : `xl/${target}`)
}

function mergesOf(text: string): SheetFacts['merges'] {
  return (text.match(/<mergeCell\b[^>]*>/g) ?? []).flatMap((tag) => {
    const [from, to] = (attribute(tag, 'ref') ?? '').split(':').map(placeOf)
    return from && to ? [{ top: from.row, left: from.column, bottom: to.row, right: to.column }] : []
  })
}

export function factsOf(parts: ReadonlyMap<string, string>, name: string): SheetFacts {
  const text = sheetText(parts, name)
  if (!text) return nothing()
  const facts: SheetFacts = { ...nothing(), merges: mergesOf(text) }
  for (const tag of text.match(/<row\b[^>]*>/g) ?? []) {
    if (/\bhidden="(1|true)"/.test(tag)) facts.hidden.add(Number(attribute(tag, 'r')) - 1)
  }
  for (const [, tag = '', formula = ''] of text.matchAll(/<c\b([^>]*)>\s*<f\b[^>]*>([^<]*)<\/f>/g)) {
    const place = placeOf(attribute(tag, 'r') ?? '')
    if (place) facts.formulas.set(`${place.row}:${place.column}`, unescaped(formula))
  }
  return facts
}
