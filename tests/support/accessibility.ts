import axe from 'axe-core';
import type { Page } from 'playwright-core';

/** The rules travel to a page once: half a megabyte of script costs more than judging most of our pages. */
async function bringRules(page: Page): Promise<void> {
  if (!(await page.evaluate(() => 'axe' in window))) await page.evaluate(axe.source);
}

/** What axe finds on a page as it stands (all its rules), a line for each rule that is broken: `rule: element; element`. */
export async function accessibilityFaults(page: Page, within = 'html'): Promise<string[]> {
  await bringRules(page);
  // Every rule judges every element; only the long lists of what passed are spared (a methods page has thousands).
  return page.evaluate(async (selector) => {
    const { axe: rules } = window as unknown as { axe: typeof axe };
    const { violations, passes } = await rules.run(selector, { resultTypes: ['violations'] });
    if (passes.length === 0) throw new Error(`axe judged nothing within "${selector}".`);
    return violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join('; ')}`);
  }, within);
}

/** By how many pixels a page is wider than its window. */
export const overflowOf = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
