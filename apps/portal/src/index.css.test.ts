// @vitest-environment node
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const css = readFileSync(fileURLToPath(new URL('./index.css', import.meta.url)), 'utf8');
const tokens = new Map(
  [...css.matchAll(/--([a-z]+): light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/g)].map(
    ([, name, light, dark]) => [name ?? '', { light: light ?? '', dark: dark ?? '' }],
  ),
);
type Theme = 'light' | 'dark';
const themes: Theme[] = ['light', 'dark'];
const colour = (name: string, theme: Theme) => tokens.get(name)?.[theme] ?? '';

const channels = (hex: string) => [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16));

/** Relative luminance, WCAG 2.2. */
function luminance(rgb: number[]): number {
  const [r = 0, g = 0, b = 0] = rgb.map((value) => {
    const part = value / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: number[], b: number[]): number {
  const [high = 0, low = 0] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (high + 0.05) / (low + 0.05);
}

const mix = (over: number[], under: number[], share: number) =>
  over.map((value, index) => value * share + (under[index] ?? 0) * (1 - share));

const texts = ['graphite', 'pencil', 'marking', 'brass', 'verdigris', 'vermilion', 'plum'];

describe('the colours of the product', () => {
  it('names all ten roles in both themes', () => {
    expect([...tokens.keys()].sort()).toEqual([...texts, 'paper', 'rule', 'sheet'].sort());
  });

  it.each(themes)('reads at 4.5 to 1 or better on paper and sheet in the %s theme', (theme) => {
    for (const ground of ['paper', 'sheet']) {
      for (const text of texts) {
        const ratio = contrast(channels(colour(text, theme)), channels(colour(ground, theme)));
        expect(ratio, `${text} on ${ground}`).toBeGreaterThanOrEqual(4.5);
      }
    }
  });

  it.each(themes)('reads at 4.5 to 1 or better on the tints of rows and notices in the %s theme', (theme) => {
    const grounds = ['marking', 'brass', 'vermilion', 'verdigris'].flatMap((tint) =>
      ['paper', 'sheet'].map((under) => ({
        tint,
        rgb: mix(channels(colour(tint, theme)), channels(colour(under, theme)), 0.08),
      })),
    );
    for (const { tint, rgb } of grounds) {
      for (const text of texts) {
        expect(
          contrast(channels(colour(text, theme)), rgb),
          `${text} on ${tint} tint`,
        ).toBeGreaterThanOrEqual(4.5);
      }
    }
  });

  it.each(themes)('keeps borders of controls and the focus ring at 3 to 1 in the %s theme', (theme) => {
    for (const mark of ['pencil', 'marking']) {
      for (const ground of ['paper', 'sheet']) {
        expect(
          contrast(channels(colour(mark, theme)), channels(colour(ground, theme))),
        ).toBeGreaterThanOrEqual(3);
      }
    }
  });

  it.each(themes)('reads on the primary button in the %s theme', (theme) => {
    expect(
      contrast(channels(colour('sheet', theme)), channels(colour('marking', theme))),
    ).toBeGreaterThanOrEqual(4.5);
  });
});
