/** What the series page lets one choose; the address names the choices by these words. */
export const rowChoices = ['anion', 'lab'] as const
export type RowChoice = typeof rowChoices[number]
export const showChoices = ['all', 'to-look-at', 'binding', 'set-aside'] as const
export type ShowChoice = typeof showChoices[number]
