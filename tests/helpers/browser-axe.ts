import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { ROOT } from '../../db/up/root.mjs';

const SOURCE = readFileSync(join(ROOT, 'node_modules/axe-core/axe.min.js'), 'utf8');
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

const COLOUR_RULES = ['color-contrast', 'link-in-text-block'];

interface AxeResult {
  readonly id: string;
  readonly help: string;
  readonly nodes: readonly { readonly target: readonly unknown[]; readonly failureSummary?: string }[];
}
interface Axe {
  run(context: Document, options: object): Promise<{ violations: AxeResult[] }>;
}

/**
 * What axe finds wrong with the page as it stands, one line for each place: WCAG 2.2 AA and best practice, or only what
 * colours decide.
 */
export async function axeFaults(page: Page, what: 'all' | 'colours' = 'all'): Promise<string[]> {
  if (!(await page.evaluate(() => 'axe' in window))) await page.evaluate(SOURCE);
  const runOnly = what === 'all' ? { type: 'tag', values: TAGS } : { type: 'rule', values: COLOUR_RULES };
  const violations = await page.evaluate(
    async (options) => {
      const { axe } = window as unknown as { axe: Axe };
      return (await axe.run(document, options)).violations;
    },
    { runOnly, resultTypes: ['violations'] },
  );
  return violations.flatMap(({ id, help, nodes }) =>
    nodes.map(
      (node) =>
        `${id} (${help}): ${node.target.join(' ')} ${(node.failureSummary ?? '').replaceAll(/\s+/g, ' ')}`,
    ),
  );
}
