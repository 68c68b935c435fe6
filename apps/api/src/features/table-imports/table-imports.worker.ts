import type { UnitSymbol } from '@trammel/shared/characteristics';
import type { ImportSettings, ReadingMapping } from '@trammel/shared/table-import';
import { serveWorker } from '../../tables/serve-worker.ts';
import { writeWorkbook, type WorkbookPlan } from '../../tables/write-workbook.ts';
import { readCharacteristicRows, type CharacteristicMapping } from './characteristic-rows.ts';
import { characteristicColumnOf } from './column-words.ts';
import { describeColumns, splitTable } from './import-settings.ts';
import { openTableFile, readHeldFile, type HeldFile } from './open-table.ts';
import { readReadingRows, type ReadingContext } from './reading-rows.ts';
import { isReadingHeader, suggestCharacteristicMapping, suggestReadingMapping } from './suggest-mapping.ts';

export interface OpenTask {
  readonly kind: 'open';
  readonly name: string;
  readonly bytes: Uint8Array;
}
export interface CharacteristicsTask {
  readonly kind: 'characteristics';
  readonly file: HeldFile;
  readonly settings: ImportSettings | null;
  readonly mapping: CharacteristicMapping | null;
  readonly defaultUnit: UnitSymbol;
}
export interface ReadingsTask {
  readonly kind: 'readings';
  readonly file: HeldFile;
  readonly settings: ImportSettings | null;
  readonly mapping: ReadingMapping | null;
  readonly context: ReadingContext;
}
export interface WorkbookTask {
  readonly kind: 'workbook';
  readonly plan: WorkbookPlan;
}

function readCharacteristics({
  file,
  settings: declared,
  mapping: wanted,
  defaultUnit,
}: CharacteristicsTask) {
  const { settings, table } = readHeldFile(
    file,
    declared,
    (header) => characteristicColumnOf(header) !== null,
  );
  const split = splitTable(table, settings);
  const mapping = wanted ?? suggestCharacteristicMapping(split);
  return {
    settings,
    mapping,
    columns: describeColumns(split),
    totalRows: split.body.length,
    ...readCharacteristicRows(split, settings, mapping, defaultUnit),
  };
}

function readReadings({ file, settings: declared, mapping: wanted, context }: ReadingsTask) {
  const { settings, table } = readHeldFile(file, declared, isReadingHeader);
  const split = splitTable(table, settings);
  const mapping = wanted ?? suggestReadingMapping(split, context.facts);
  const nothing = { changes: [], same: 0, refused: [], refusedCount: 0, newPieces: [] };
  return {
    settings,
    mapping,
    columns: describeColumns(split),
    totalRows: split.body.length,
    ...(mapping === null ? nothing : readReadingRows(split, settings, mapping, context)),
  };
}

export type ReadCharacteristicsAnswer = ReturnType<typeof readCharacteristics>;
export type ReadReadingsAnswer = ReturnType<typeof readReadings>;

serveWorker((task: OpenTask | CharacteristicsTask | ReadingsTask | WorkbookTask) => {
  switch (task.kind) {
    case 'open':
      return openTableFile(task.name, task.bytes);
    case 'characteristics':
      return readCharacteristics(task);
    case 'readings':
      return readReadings(task);
    case 'workbook':
      return writeWorkbook(task.plan);
  }
});
