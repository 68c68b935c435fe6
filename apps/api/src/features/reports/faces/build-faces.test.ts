import { create } from 'fontkit';
import { expect, it } from 'vitest';
import { buildFaces, faceNames } from './build-faces.ts';

it('draws every letter that parts are described with, in one file a weight', () => {
  const faces = buildFaces();
  for (const name of faceNames) {
    const font = create(Buffer.from(faces[name]));
    for (const letter of 'Ø25 ±0,01 µm ΔE ≤ Łódź ⌀ ≥ ° − Ω μ Ж ß ç ğ ő') {
      const code = letter.codePointAt(0) ?? 0;
      expect(font.hasGlyphForCodePoint(code), `${name} ${letter}`).toBe(true);
      expect(font.glyphForCodePoint(code).advanceWidth, `${name} ${letter}`).toBeGreaterThan(0);
    }
  }
  const stem = (name: 'figures' | 'strong-figures' | 'text' | 'strong', letter: string) => {
    const points = create(Buffer.from(faces[name]))
      .glyphForCodePoint(letter.codePointAt(0) ?? 0)
      ._decode()?.points;
    const places = points?.map((point) => point.x) ?? [];
    return Math.max(...places) - Math.min(...places);
  };
  // The bar alone: what the weights move.
  expect(stem('strong-figures', '|')).toBeGreaterThan(stem('figures', '|') * 1.3);
  expect(stem('strong', '|')).toBeGreaterThan(stem('text', '|') * 1.3);
  const figures = create(Buffer.from(faces.figures));
  const widths = [...'0123456789.-'].map(
    (letter) => figures.glyphForCodePoint(letter.charCodeAt(0)).advanceWidth,
  );
  expect(new Set(widths).size).toBe(1);
}, 60_000);
