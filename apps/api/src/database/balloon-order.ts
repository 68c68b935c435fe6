/** Order of balloon numbers as on the drawing: 2 before 10, 12 before 12a before 13, 12.2 before 12.10. */
export function compareBalloons(a: string, b: string): number {
  const [first, second] = [partsOf(a), partsOf(b)];
  return (
    first.digits - second.digits ||
    first.sub - second.sub ||
    (first.letter < second.letter ? -1 : first.letter > second.letter ? 1 : 0)
  );
}

function partsOf(balloon: string): { digits: number; letter: string; sub: number } {
  const match = /^(\d+)(?:([a-z])|\.(\d+))?$/.exec(balloon);
  return { digits: Number(match?.[1] ?? 0), letter: match?.[2] ?? '', sub: Number(match?.[3] ?? 0) };
}
