import { StopSentence } from './stop-sentence.mjs'

export const widths = [1440, 1024, 390]

/** @type {('light' | 'dark')[]} */
export const themes = ['light', 'dark']

/** What Debian's Chromium needs to run without a display, as root too, and to keep quiet on the network. */
export const quietChromium = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync']

/** @param {string} executablePath */
export async function openBrowser(executablePath) {
  const { chromium } = await import('playwright-core')
  // Unhinted, as on a display of today: hinting bends small letters in pictures.
  return chromium.launch({ executablePath, args: [...quietChromium, '--font-render-hinting=none'] })
}

/**
 * Signs a browser context in to a demo account.
 * @param {import('playwright-core').BrowserContext} context with a baseURL @param {string} email
 */
export async function signIn(context, email) {
  const answer = await context.request.post('/api/auth/sign-in', { data: { email, password: 'anionary-demo' } })
  if (!answer.ok()) throw new StopSentence(`signing in as ${email} was answered with ${answer.status()}: ${await answer.text()}`)
}
