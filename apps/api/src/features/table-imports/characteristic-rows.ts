// Longer than most: each cell of a row has its reader here, so that a refusal is found by its column.
import { isUndetermined, type ToleranceLimits } from '@trammel/metrology/conformance';
import { parseDecimal } from '@trammel/metrology/decimal';
import { statedLimits } from '@trammel/metrology/tolerance-notation';
import {
  characteristicRequest,
  type CharacteristicInput,
  type CharacteristicKind,
  type GeometricSpec,
  type UnitSymbol,
} from '@trammel/shared/characteristics';
import {
  characteristicColumns,
  type CharacteristicColumn,
  type ImportIssue,
  type ImportSettings,
} from '@trammel/shared/table-import';
import { unguardedText } from '../../tables/export-text.ts';
import type { TableRow } from '../../tables/table.ts';
import { isBlank } from '../../tables/table.ts';
import { classOf, geometricTypeIn, geometricTypeOf, kindOf, unitOf, yesOrNo } from './cell-words.ts';
import { columnLabels, readHeader } from './column-words.ts';
import { localText, type SplitTable } from './import-settings.ts';
import { RowRefused, refuse, toleranceOfRow, type CellOf } from './stated-tolerance-of-row.ts';

export type CharacteristicMapping = Partial<Record<CharacteristicColumn, number | null>>;

export interface ReadCharacteristic {
  readonly line: number;
  readonly input: CharacteristicInput;
  readonly limits: ToleranceLimits;
}

export interface ReadCharacteristics {
  readonly rows: ReadCharacteristic[];
  readonly refused: ImportIssue[];
}

const mostRows = 2000;

/** Every row as a characteristic, or refused by line with reason and remedy. */
export function readCharacteristicRows(
  split: SplitTable,
  settings: ImportSettings,
  mapping: CharacteristicMapping,
  defaultUnit: UnitSymbol,
): ReadCharacteristics {
  const rows: ReadCharacteristic[] = [];
  const refused: ImportIssue[] = [];
  const lineOf = new Map<string, number>();
  const headerUnit = unitOfHeader(split, mapping) ?? defaultUnit;
  for (const row of split.body) {
    if (isBlank(row)) continue;
    try {
      const read = readRow(row, settings, mapping, headerUnit);
      const before = lineOf.get(read.input.balloon);
      if (before !== undefined) {
        refuse(
          'balloon',
          `Balloon ${read.input.balloon} stands already on line ${before}.`,
          'Number repeats 6.1, 6.2 and so on, or remove the row.',
        );
      }
      if (rows.length >= mostRows)
        refuse(
          null,
          `A revision takes at most ${mostRows} characteristics.`,
          'Split the drawing into several parts or sheets.',
        );
      lineOf.set(read.input.balloon, row.line);
      rows.push(read);
    } catch (error) {
      if (!(error instanceof RowRefused)) throw error;
      const { column, detail, remedy } = error.fault;
      refused.push({ line: row.line, column: column && columnLabels[column], detail, remedy });
    }
  }
  return { rows, refused };
}

function unitOfHeader(split: SplitTable, mapping: CharacteristicMapping): UnitSymbol | null {
  for (const column of ['nominal', 'tolerance', 'lowerLimit', 'upperLimit'] as const) {
    const index = mapping[column];
    const header = index === undefined || index === null ? undefined : split.header?.cells[index];
    const unit = typeof header === 'string' ? readHeader(header).unit : null;
    const known = unit === null ? null : unitOf(unit);
    if (known) return known;
  }
  return null;
}

function readRow(
  row: TableRow,
  settings: ImportSettings,
  mapping: CharacteristicMapping,
  defaultUnit: UnitSymbol,
): ReadCharacteristic {
  const cell: CellOf = (column) => {
    const index = mapping[column];
    return index === undefined || index === null ? '' : unguardedText(localText(row.cells[index], settings));
  };
  const balloon = cell('balloon')
    .replace(/^[#№]\s?|\.$/g, '')
    .replace(/^(\d+)\s*([A-Z])$/, (_, digits: string, letter: string) => digits + letter.toLowerCase());
  if (balloon === '')
    refuse(
      'balloon',
      'The row has no balloon number.',
      'Fill it in, or remove the row if it is a heading or a total.',
    );
  const description = cell('description');
  const geometricType = readGeometricType(cell, description);
  const geometric = geometricType !== null;
  const stated = toleranceOfRow(cell, settings, geometric);
  const kind = readKind(
    cell,
    stated.hint,
    geometric,
    stated.tolerance.form === 'none' && stated.tolerance.nominal === null,
  );
  const unit = readUnit(cell, stated.unit, kind, defaultUnit);
  const limits = statedLimits(stated.tolerance, unit);
  if (isUndetermined(limits))
    return refuse('tolerance', `${limits.reason}.`, 'Correct nominal, tolerance or unit.');
  const parsed = characteristicRequest.safeParse({
    balloon,
    sheet: cell('sheet'),
    zone: cell('zone'),
    // A sheet without any column of names is still a table of characteristics.
    description: description || (geometricType ?? (mapping.description == null ? `Balloon ${balloon}` : '')),
    kind,
    tolerance: stated.tolerance,
    geometric: geometricType === null ? null : readGeometric(geometricType, cell),
    unit,
    decimals: readDecimals(cell, limits),
    class: readClass(cell),
    method: cell('method'),
    attributeAllowed: readFlag(cell, 'attributeAllowed') ?? kind === 'attribute',
    pieces: readPieces(cell),
    controlledBy: cell('controlledBy')
      .split(/[,;\s]+/)
      .filter((text) => text !== ''),
    note: cell('note'),
  });
  if (parsed.success) return { line: row.line, input: parsed.data, limits };
  const issue = parsed.error.issues[0];
  return refuse(
    columnOf(String(issue?.path[0] ?? '')),
    wordsOf(issue?.message ?? '', String(issue?.path[0] ?? '')),
    'Correct the cell, or map another column.',
  );
}

const columnOf = (field: string): CharacteristicColumn | null =>
  characteristicColumns.find((column) => column === field) ??
  (field === 'geometric' ? 'geometricType' : null);

const wordsOf = (message: string, field: string): string =>
  field === 'description' && /fill/i.test(message) ? 'The row has no description.' : message;

function readGeometricType(cell: CellOf, description: string): GeometricSpec['type'] | null {
  const written = cell('geometricType');
  if (written !== '') {
    return (
      geometricTypeOf(written) ??
      geometricTypeIn(written) ??
      refuse(
        'geometricType',
        `"${written.slice(0, 40)}" is no geometric tolerance known here.`,
        'Write its name, such as position or flatness.',
      )
    );
  }
  const kindCell = cell('kind');
  const ofKind = geometricTypeOf(kindCell);
  if (ofKind) return ofKind;
  const kind = kindCell === '' ? null : kindOf(kindCell);
  return kind === null || kind === 'geometric' ? geometricTypeIn(description) : null;
}

function readKind(
  cell: CellOf,
  hint: 'basic' | 'reference' | null,
  geometric: boolean,
  noNumbers: boolean,
): CharacteristicKind {
  const written = cell('kind');
  if (written !== '') {
    const kind = kindOf(written) ?? (geometricTypeOf(written) ? 'geometric' : null);
    return (
      kind ??
      refuse(
        'kind',
        `"${written.slice(0, 40)}" is no kind of characteristic.`,
        'Write size, geometric, attribute, note, reference, basic or material-performance.',
      )
    );
  }
  if (hint) return hint;
  if (geometric) return 'geometric';
  return noNumbers ? 'attribute' : 'size';
}

function readUnit(
  cell: CellOf,
  beside: string | null,
  kind: CharacteristicKind,
  fallback: UnitSymbol,
): UnitSymbol {
  const written = cell('unit') || beside;
  if (!written || written === '-') return kind === 'attribute' || kind === 'note' ? '1' : fallback;
  return (
    unitOf(written) ??
    refuse(
      'unit',
      `The unit "${written.slice(0, 20)}" is not taken.`,
      'Write one of the units of the template, such as mm, in, deg, N or HRC.',
    )
  );
}

function readClass(cell: CellOf): CharacteristicInput['class'] {
  const written = cell('class');
  if (written === '') return 'none';
  return (
    classOf(written) ??
    refuse(
      'class',
      `"${written.slice(0, 40)}" is no class of characteristic.`,
      'Write none, significant, critical or safety.',
    )
  );
}

function readFlag(cell: CellOf, column: CharacteristicColumn): boolean | null {
  const written = cell(column);
  if (written === '') return null;
  return (
    yesOrNo(written) ?? refuse(column, `"${written.slice(0, 20)}" is neither yes nor no.`, 'Write yes or no.')
  );
}

function readWhole(cell: CellOf, column: CharacteristicColumn): number | null {
  const written = cell(column);
  if (written === '') return null;
  return /^\d{1,4}$/.test(written)
    ? Number(written)
    : refuse(column, `"${written.slice(0, 20)}" is not a whole number.`, 'Write digits alone.');
}

function readPieces(cell: CellOf): number | null {
  return readWhole(cell, 'pieces');
}

function readDecimals(cell: CellOf, limits: ToleranceLimits): number {
  const written = readWhole(cell, 'decimals');
  if (written !== null) return written;
  const scales = [limits.nominal, limits.lower, limits.upper].map((text) => {
    const parsed = text === null ? null : parseDecimal(text);
    return parsed === null || isUndetermined(parsed) ? 0 : parsed.scale;
  });
  return Math.min(8, Math.max(0, ...scales));
}

function readGeometric(type: GeometricSpec['type'], cell: CellOf): GeometricSpec {
  const modifier = cell('modifier').toUpperCase();
  const known = {
    '': 'RFS',
    RFS: 'RFS',
    S: 'RFS',
    MMC: 'MMC',
    M: 'MMC',
    'Ⓜ': 'MMC',
    LMC: 'LMC',
    L: 'LMC',
    'Ⓛ': 'LMC',
  } as const;
  const condition = Object.hasOwn(known, modifier)
    ? known[modifier as keyof typeof known]
    : refuse('modifier', `"${modifier.slice(0, 20)}" is no material condition.`, 'Write RFS, MMC or LMC.');
  const side = cell('feature').toLowerCase();
  const diametral = readFlag(cell, 'diametral') ?? /^[Ø⌀]/.test(cell('tolerance'));
  return {
    type,
    diametral,
    modifier: condition,
    datums: cell('datums'),
    feature: /^ext|shaft|außen|welle/.test(side) ? 'external' : 'internal',
    sizeBalloon: cell('sizeBalloon') || null,
  };
}
