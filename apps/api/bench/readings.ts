/** Readings around 25.000 from a fixed generator, so that every run judges the same numbers; one a line, as stored. */
export function rowsFor(count: number, pieces: number): string[] {
  let state = 12_345;
  const next = () => (state = (state * 1_103_515_245 + 12_345) & 0x7fffffff) / 0x7fffffff;
  return Array.from({ length: count }, () =>
    Array.from({ length: pieces }, () => (24.96 + next() * 0.08).toFixed(3)).join('\n'),
  );
}
