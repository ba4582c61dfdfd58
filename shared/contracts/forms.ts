import { z } from 'zod'

/** Parts that the forms and the routes share; messages finish the sentence "it …". */
export const text = (most: number) => z.string().trim().max(most, `must have at most ${most} characters`)
export const requiredText = (most: number) => text(most).min(1, 'must not be empty')
/** May be left for later: an empty field is null. */
export const laterText = (most: number) => text(most).nullish().transform(given => given || null)

export const number = z.number('must be a number')
export const positive = number.positive('must be above 0')
export const later = <Value extends z.ZodType>(value: Value) => value.nullish().transform(given => given ?? null)
export const day = z.iso.date('must be a day, as in 2026-03-04')
