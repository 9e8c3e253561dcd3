import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

/** Smallest side that a gloved finger hits, in CSS pixels. */
const TARGET = 56;

/** Controls lower than a gloved finger needs, or too narrow for it: each with its size. Points of a map are one target. */
export function smallTargets(page: Page): Promise<string[]> {
  return page.evaluate((target) => {
    const controls = document.querySelectorAll<HTMLElement>(
      'a[href], button, input:not([type=hidden]), select, textarea, summary',
    );
    return [...controls].flatMap((control) => {
      // By finger the nearest point of a map is meant, wherever it is touched; the skip link is for the keyboard.
      if (control.closest('[role=group][aria-label^="Points of"]') || control.closest('.sr-only, .skip-link'))
        return [];
      const label = control.matches('[type=checkbox], [type=radio]') ? control.closest('label') : null;
      const { width, height } = (label ?? control).getBoundingClientRect();
      if (width === 0 || height === 0 || getComputedStyle(control).visibility === 'hidden') return [];
      const high = height >= target - 0.5;
      // In a row of keys a key may be a little narrower than it is high, never less than a target of WCAG 2.5.5.
      const wide = width >= 44 - 0.5;
      const name = control.getAttribute('aria-label') ?? control.textContent?.trim().slice(0, 40);
      return high && wide
        ? []
        : [`${control.tagName} "${name}" ${Math.round(width)} x ${Math.round(height)}`];
    });
  }, TARGET);
}

/** How far the page is wider than the screen, in pixels; 0 where it fits. */
export const overflow = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** Asserts that axe finds nothing; with `rules`, by those only. */
export async function noViolations(page: Page, where: string, rules?: string[]): Promise<void> {
  const builder = new AxeBuilder({ page });
  const { violations } = await (rules ? builder.withRules(rules) : builder).analyze();
  const found = violations.map(
    (one) => `${one.id}: ${one.nodes.map((node) => node.html.slice(0, 140)).join(' | ')}`,
  );
  expect(found, where).toEqual([]);
}

/** Shows the page by day or by night, whatever was chosen. */
export const showTheme = (page: Page, theme: 'day' | 'night'): Promise<void> =>
  page.evaluate((chosen) => {
    document.documentElement.dataset.theme = chosen;
  }, theme);
