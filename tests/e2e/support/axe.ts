import { createRequire } from 'node:module';
import type { Page } from 'playwright-core';

// The engine that comes with the builder, used without it: the builder loads it anew for every run and makes selectors
// for everything that passed, which takes several times as long as the checks.
const { source } = createRequire(createRequire(import.meta.url).resolve('@axe-core/playwright'))('axe-core') as { source: string };

interface Violation {
  id: string;
  nodes: { target: string[]; failureSummary?: string }[];
}

/** Rules whose answer depends on colours. */
const onColours = ['color-contrast', 'link-in-text-block'];

/** What axe finds on a page as it stands, one line a rule; only by the rules on colours if told so. No page of the registry has frames. */
export const axeFindings = async (page: Page, coloursOnly = false): Promise<string[]> => {
  if (!(await page.evaluate(() => 'axe' in window))) await page.evaluate(source);
  const violations = await page.evaluate(async (rules) => {
    const { axe } = window as unknown as { axe: { run: (root: Document, options: object) => Promise<{ violations: Violation[] }> } };
    return (await axe.run(document, { resultTypes: ['violations'], ...(rules ? { runOnly: rules } : {}) })).violations;
  }, coloursOnly ? onColours : null);
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target, failureSummary }) => `${target.join(' ')} (${failureSummary?.split('\n').at(1)?.trim() ?? ''})`).join('; ')}`);
};
