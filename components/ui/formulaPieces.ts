/** A formula cut for setting: subscript first, then the charge, staggered. */
export interface FormulaPiece {
  text: string
  level: 'base' | 'sub' | 'sup'
}

/**
 * Cuts a formula written in plain text, such as 'SO4^2-' or 'Na2SO4', into the pieces a line of type needs.
 * Signs become true minus signs; digits after a letter or bracket become subscripts.
 */
export function formulaPieces(formula: string): FormulaPiece[] {
  const [body = '', charge = ''] = formula.split('^')
  const pieces: FormulaPiece[] = (body.match(/\d+(?:\.\d+)?|[^\d]+/g) ?? [])
    .map((text, index) => ({ text, level: index > 0 && /^\d/.test(text) ? 'sub' : 'base' }))
  return charge === '' ? pieces : [...pieces, { text: charge.replace('-', '−'), level: 'sup' }]
}
