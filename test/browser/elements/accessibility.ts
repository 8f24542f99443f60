import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Page } from 'playwright-core';

const engine = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** What axe-core finds against WCAG 2.2 A and AA and its best practice, a line each. */
export async function violations(page: Page): Promise<string[]> {
  // Evaluated by the browser's protocol, which a content security policy does not bind.
  await page.evaluate(engine);
  return page.evaluate(async () => {
    const axe = Reflect.get(globalThis, 'axe');
    const { violations: found } = await axe.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
    });
    return found.flatMap(
      ({ id, nodes }: { id: string; nodes: { target: string[]; failureSummary: string }[] }) =>
        nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary}`),
    );
  });
}
