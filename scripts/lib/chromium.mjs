import { existsSync } from 'node:fs'
import { installDebian } from './debian.mjs'

const CHROMIUM = '/usr/bin/chromium'

/** Path of Debian's Chromium, installed first when absent and permitted. @returns {Promise<string>} */
export async function chromium() {
  if (!existsSync(CHROMIUM)) await installDebian(['chromium'], 'Chromium')
  return CHROMIUM
}
