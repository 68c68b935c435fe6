const longestRun = 300;

/** Labels typed one a line; `A7..A12` is a run that keeps its letters and leading zeros. */
export function labelsFrom(typed: string): string[] {
  return typed
    .split(/[\n,;]/)
    .map((line) => line.trim())
    .filter((line) => line !== '')
    .flatMap(runOf);
}

function runOf(line: string): string[] {
  const match = /^(.*?)(\d{1,6})\s*\.\.\s*(.*?)(\d{1,6})$/.exec(line);
  if (!match) return [line];
  const [, prefix = '', first = '', again = '', last = ''] = match;
  const from = Number(first);
  const to = Number(last);
  if ((again !== '' && again !== prefix) || to < from || to - from >= longestRun) return [line];
  return Array.from(
    { length: to - from + 1 },
    (_, index) => prefix + String(from + index).padStart(first.length, '0'),
  );
}
