import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync(new URL('../../../app/globals.css', import.meta.url), 'utf8');

/** The colour tokens of the first block that opens with `selector`. */
function tokens(selector: string): Record<string, string> {
  const from = css.indexOf(`${selector} {`);
  expect(from).toBeGreaterThanOrEqual(0);
  const block = css.slice(from, css.indexOf('}', from));
  return Object.fromEntries([...block.matchAll(/--([a-z]+): (#[0-9a-f]{6})/g)].map((m) => [m[1], m[2]]));
}

/** Relative luminance, WCAG 2.2. */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5]
    .map((i) => parseInt(hex.slice(i, i + 2), 16) / 255)
    .map((v) => (v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4));
  return 0.2126 * (r ?? 0) + 0.7152 * (g ?? 0) + 0.0722 * (b ?? 0);
}

function contrast(a = '', b = ''): number {
  const [dark, light] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return ((light ?? 0) + 0.05) / ((dark ?? 0) + 0.05);
}

const day = tokens(':root');
const night = tokens(":root[data-theme='night']");

describe('the tokens', () => {
  for (const [name, theme] of Object.entries({ day, night })) {
    it(`letter in at least 7:1 on sheet and paper, ${name}`, () => {
      for (const colour of ['ink', 'pencil', 'chalk', 'hold', 'watch', 'met']) {
        for (const ground of ['sheet', 'paper']) {
          expect(contrast(theme[colour], theme[ground]), `${colour} on ${ground}`).toBeGreaterThanOrEqual(7);
        }
      }
    });

    it(`letter in at least 4.5:1 on the band, ${name}`, () => {
      for (const colour of ['ink', 'hold', 'watch']) {
        expect(contrast(theme[colour], theme.band), colour).toBeGreaterThanOrEqual(4.5);
      }
    });
  }

  it('are the same at night by choice and by the device', () => {
    expect(tokens(":root:not([data-theme='day'])")).toEqual(night);
  });
});
