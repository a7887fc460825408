import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';

const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

/** Accessibility faults of the page as it stands, one line each: rule, how often, first element. Empty is well. */
export async function axe(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).withTags(tags).analyze();
  return violations.map(({ id, nodes, help }) => {
    const [first] = nodes;
    return `${id} x${nodes.length} (${help}): ${first?.html.slice(0, 200) ?? ''} ${first?.failureSummary?.split('\n')[1] ?? ''}`;
  });
}
