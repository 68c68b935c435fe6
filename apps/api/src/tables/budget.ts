/** What a table file may cost before it is refused. Measured reason: a 400 kB workbook can hold 400 MB of blanks. */
export const tableBudget = {
  fileBytes: 10 * 1024 * 1024,
  zipEntries: 200,
  entryBytes: 20 * 1024 * 1024,
  inflatedBytes: 50 * 1024 * 1024,
  /** Inflated over packed, for parts above 100 kB; small parts of blanks are harmless. */
  ratio: 100,
  ratioFromBytes: 100 * 1024,
  rows: 200_000,
  columns: 1000,
  cells: 1_000_000,
  cellCharacters: 4000,
  seconds: 10,
  heapMegabytes: 384,
} as const;
