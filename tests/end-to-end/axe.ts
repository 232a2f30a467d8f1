import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from '@playwright/test'

const source = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

/** Violations of WCAG 2.2 A and AA and of axe's best practices on the page as it stands, a line each; no rule is off. */
export async function axeFinds(page: Page): Promise<string[]> {
  // The page's own policy forbids inline script: the driver evaluates axe outside of it.
  await page.evaluate(source)
  return page.evaluate(async () => {
    const { axe } = globalThis as unknown as {
      axe: { run(): Promise<{ violations: { id: string; help: string; nodes: { html: string }[] }[] }> }
    }
    const { violations } = await axe.run()
    return violations.map(
      (one) => `${one.id}: ${one.help}: ${one.nodes.map((node) => node.html.slice(0, 120)).join(' | ')}`,
    )
  })
}
