import { fold, tidy } from './fold'
import type { dateOrders } from '../types'

export type DateOrder = typeof dateOrders[number]

const months: readonly RegExp[] = [/^jan|^ene/, /^feb|^fev/, /^mar|^maerz|^mrz/, /^apr|^avr|^abr/, /^ma[iyj]/, /^ju(?:n|in)/, /^jul|^juil/, /^au[gou]|^ago|^aou/, /^sep/, /^o[ck]t/, /^nov/, /^de[czs]|^dic/]
const monthOf = (word: string) => months.findIndex(pattern => pattern.test(fold(word))) + 1

const numeric = /^(\d{1,4})([./-])(\d{1,2})\2(\d{1,4})(?:[T ,]+\d{1,2}[:.h]\d{2}.*)?$/
const dayFirst = /^(\d{1,2})(?:\.|st|nd|rd|th)?[ -]+(?:de )?([^\d\s.-]{3,})\.?[ ,-]+(?:de )?(\d{2}|\d{4})$/i
const monthFirst = /^([^\d\s.-]{3,})\.? (\d{1,2})(?:st|nd|rd|th)?,? (\d{4})$/i

const two = (number: number) => String(number).padStart(2, '0')

function day(year: number, month: number, dayOfMonth: number): string | null {
  const full = year < 70 ? year + 2000 : year < 100 ? year + 1900 : year
  const date = new Date(Date.UTC(full, month - 1, dayOfMonth))
  const isReal = date.getUTCFullYear() === full && date.getUTCMonth() === month - 1 && date.getUTCDate() === dayOfMonth
  return isReal && full < 2200 && full >= 1900 ? `${full}-${two(month)}-${two(dayOfMonth)}` : null
}

/** The day of a serial number of a spreadsheet (days since 30 December 1899). */
export function dayOfSerial(serial: number): string | null {
  if (serial < 20_000 || serial > 80_000) return null
  return new Date((Math.floor(serial) - 25_569) * 86_400_000).toISOString().slice(0, 10)
}

/** What the dates of a column say about their order: points put the day first, a number above 12 tells. */
export function orderOf(texts: readonly string[]): { order: DateOrder, isClear: boolean } {
  const dates = texts.map(text => numeric.exec(tidy(text))).filter(match => match !== null)
  if (dates.length > 0 && dates.every(match => match[1]?.length === 4)) return { order: 'year-month-day', isClear: true }
  const numbers = dates.filter(match => match[1]?.length !== 4)
  const isDayFirst = numbers.some(([, first]) => Number(first) > 12)
  const isMonthFirst = numbers.some(([, , , second]) => Number(second) > 12)
  if (isMonthFirst && !isDayFirst) return { order: 'month-day-year', isClear: true }
  return { order: 'day-month-year', isClear: numbers.length === 0 || isDayFirst || numbers.every(([, , mark]) => mark === '.') }
}

/** A date however written, as YYYY-MM-DD; null where it is none. */
export function readDate(text: string, order: DateOrder): string | null {
  const written = tidy(text)
  const match = numeric.exec(written)
  if (match) {
    const [first, second, third] = [Number(match[1]), Number(match[3]), Number(match[4])]
    if (match[1]?.length === 4) return day(first, second, third)
    if (order === 'year-month-day') return day(first, second, third)
    return order === 'month-day-year' ? day(third, first, second) : day(third, second, first)
  }
  const named = dayFirst.exec(written)
  if (named) return day(Number(named[3]), monthOf(named[2] ?? ''), Number(named[1]))
  const american = monthFirst.exec(written)
  return american ? day(Number(american[3]), monthOf(american[1] ?? ''), Number(american[2])) : null
}

const dayAndMonth = /^(\d{1,2})[. -]+([^\d\s.-]{3,4})\.?$/
const monthAndYear = /^([^\d\s.-]{3,4})\.?[ -](\d{2})$/

/**
 * The numbers that a spreadsheet may have turned into this date: 31.03 became 31 March, 12.31 became December 1931.
 * @param text a day as YYYY-MM-DD, 31.03.2026, 31-Mar or Mar 31
 * @returns as they were typed, empty where the text is no date
 */
export function numbersBehindDate(text: string): string[] {
  const written = tidy(text)
  const short = dayAndMonth.exec(written)
  const shortMonth = short ? monthOf(short[2] ?? '') : 0
  if (short && shortMonth > 0) return [`${Number(short[1])}.${two(shortMonth)}`, `${Number(short[1])}.${shortMonth}`]
  const withYear = monthAndYear.exec(written)
  const month = withYear ? monthOf(withYear[1] ?? '') : 0
  if (withYear && month > 0) return [`${month}.${withYear[2]}`, `${Number(withYear[2])}.${two(month)}`]
  const date = readDate(written, 'day-month-year')
  if (!date) return []
  const [year = 0, monthOfDate = 0, dayOfMonth = 0] = date.split('-').map(Number)
  const typedNumbers = [`${dayOfMonth}.${two(monthOfDate)}`, `${dayOfMonth}.${monthOfDate}`]
  return dayOfMonth === 1 ? [...typedNumbers, `${monthOfDate}.${two(year % 100)}`] : typedNumbers
}
