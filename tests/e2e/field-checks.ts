import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { keepScreenshot } from './keep-screenshot';
import { expect, type Page } from '@playwright/test';

/** Smallest side that a gloved finger hits, in CSS pixels. */
const TARGET = 56;

/**
 * What may be smaller, and why:
 * - points of a face map: the nearest point to the finger is meant, wherever the map is touched;
 * - what only a screen reader or a keyboard reaches, such as the skip link: no finger goes there.
 */
const SMALLER = '[role=group][aria-label^="Points of"] *, .sr-only, .sr-only *, .skip-link';

/** Controls lower or narrower than a gloved finger needs, each with its size; a field is hit by its label too. */
export function smallTargets(page: Page): Promise<string[]> {
  return page.evaluate(
    ([target, smaller]) => {
      const controls = document.querySelectorAll<HTMLElement>(
        'a[href], button, input:not([type=hidden]), select, textarea, summary',
      );
      return [...controls].flatMap((control) => {
        if (control.matches(smaller)) return [];
        const label = control.matches('[type=checkbox], [type=radio], [type=file]')
          ? control.closest('label')
          : null;
        const { width, height } = (label ?? control).getBoundingClientRect();
        if (width === 0 || height === 0 || getComputedStyle(control).visibility === 'hidden') return [];
        const name = control.getAttribute('aria-label') ?? control.textContent?.trim().slice(0, 40);
        return height >= target - 0.5 && width >= target - 0.5
          ? []
          : [`${control.tagName} "${name}" ${Math.round(width)} x ${Math.round(height)}`];
      });
    },
    [TARGET, SMALLER] as const,
  );
}

/** How far the page is wider than the screen, in pixels; 0 where it fits. */
export const overflow = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

const axeSource = readFileSync(
  createRequire(createRequire(import.meta.url).resolve('@axe-core/playwright')).resolve(
    'axe-core/axe.min.js',
  ),
  'utf8',
);

interface Axe {
  run(
    page: Document,
    options: { resultTypes: string[]; runOnly?: string[] },
  ): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }>;
}

/**
 * Asserts that axe finds nothing; with `rules`, by those only. Axe stays in the page for the next time: put in anew for
 * each screen, as its own builder does, it takes most of the time.
 */
export async function noViolations(page: Page, where: string, rules?: string[]): Promise<void> {
  if (!(await page.evaluate(() => 'axe' in window))) await page.evaluate(axeSource);
  const found = await page.evaluate(async (only) => {
    const { axe } = window as unknown as { axe: Axe };
    const options = { resultTypes: ['violations'], ...(only ? { runOnly: only } : {}) };
    const { violations } = await axe.run(document, options);
    return violations.map(
      ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 140)).join(' | ')}`,
    );
  }, rules);
  expect.soft(found, where).toEqual([]);
}

/** Shows the page by day or by night, whatever was chosen. */
export const showTheme = (page: Page, theme: 'day' | 'night'): Promise<void> =>
  page.evaluate((chosen) => {
    document.documentElement.dataset.theme = chosen;
  }, theme);

const shapes = [
  { width: 360, height: 640, theme: 'day', rules: [] },
  { width: 820, height: 1180, theme: 'night', rules: ['color-contrast'] },
  { width: 390, height: 844, theme: 'day', rules: null },
] as const;
const everyShape = [360, 820, 390].flatMap((width) =>
  (['night', 'day'] as const).map((theme) => ({
    width,
    height: { 360: 640, 390: 844, 820: 1180 }[width] ?? 844,
    theme,
    rules: null,
  })),
);

/**
 * Asserts of what is on the page that it fits a small phone, a phone and a tablet, by day and by night: nothing runs
 * out of the screen, a glove hits every control, axe finds nothing. The page stays as it is and is only made wider or
 * narrower; it ends as a phone by day.
 * @param every tries each width by each light with all of axe, instead of each width and each light once
 */
export async function fitsEveryShape(page: Page, where: string, every: boolean): Promise<void> {
  for (const { width, height, theme, rules } of every ? everyShape : shapes) {
    await page.setViewportSize({ width, height });
    await showTheme(page, theme);
    await page.evaluate(
      () => new Promise((drawn) => requestAnimationFrame(() => requestAnimationFrame(() => drawn(null)))),
    );
    const shape = `${where} at ${width} px by ${theme}`;
    expect.soft(await overflow(page), `${shape} is wider than the screen by`).toBe(0);
    expect.soft(await smallTargets(page), `too small on ${shape}`).toEqual([]);
    if (rules === null) await noViolations(page, shape);
    else if (rules.length > 0) await noViolations(page, shape, [...rules]);
    if (every) await keepScreenshot(page, `every-${where}-${width}-${theme}`);
  }
}
