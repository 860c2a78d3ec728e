import { expect, type Page } from '@playwright/test';
import axe from 'axe-core';

const rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22a', 'wcag22aa', 'best-practice'];

async function violations(page: Page): Promise<string[]> {
  const loaded = await page.evaluate(() => 'axe' in window);
  if (!loaded) await page.evaluate(axe.source);
  const found = await page.evaluate(
    (values) =>
      (window as unknown as { axe: typeof axe }).axe.run(document, {
        runOnly: { type: 'tag', values },
        // All that is asked for; what holds is not worth carrying over.
        resultTypes: ['violations'],
        iframes: false,
        preload: false,
      }),
    rules,
  );
  return found.violations.map(({ id, help, nodes }) => {
    const places = nodes.slice(0, 3).map((node) => `${node.html}\n    ${node.failureSummary}`);
    return `${id}: ${help}, ${nodes.length} times:\n  ${places.join('\n  ')}`;
  });
}

/** What reaches past the right edge, widest first; empty when nothing scrolls sideways. */
export function overflowing(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const { clientWidth, scrollWidth } = document.documentElement;
    if (scrollWidth <= clientWidth) return [];
    return Array.from(document.querySelectorAll('body *'))
      .filter((element) => element.getBoundingClientRect().right > clientWidth + 0.5)
      .slice(-5)
      .map((element) => `${element.tagName}.${element.className} of ${scrollWidth} px`);
  });
}

/**
 * Says of the page shown whether everybody can use it. It only notes what is wrong, so that one
 * page's fault does not hide the next one's; the test fails when it ends.
 */
export async function expectUsable(page: Page): Promise<void> {
  const place = `${new URL(page.url()).pathname} "${await page.title()}"`;
  expect.soft(await violations(page), `axe on ${place}`).toEqual([]);
  expect.soft(await overflowing(page), `overflow on ${place}`).toEqual([]);
}
