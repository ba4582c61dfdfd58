import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from '@playwright/test'

const source = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

interface Violation { id: string, impact: string, nodes: { target: string[] }[] }

/** What axe finds serious or critical on the page, each with its places. */
export async function seriousViolations(page: Page): Promise<string[]> {
  await page.evaluate(source)
  return page.evaluate(async () => {
    const { axe } = window as unknown as { axe: { run: () => Promise<{ violations: Violation[] }> } }
    const { violations } = await axe.run()
    return violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
      .map(({ id, nodes }) => `${id}: ${nodes.map(node => node.target.join(' ')).join(', ')}`)
  })
}

/** By how many pixels the page is wider than its window. */
export function sidewaysScroll(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
}
