import { isUndetermined, type ToleranceLimits } from '@trammel/metrology/conformance';
import { readTolerance, statedLimits, writeTolerance } from '@trammel/metrology/tolerance-notation';
import {
  characteristicRequest,
  unitSymbols,
  type CharacteristicInput,
  type CharacteristicResponse,
  type GeometricSpec,
} from '@trammel/shared/characteristics';
import { classWords, geometricTypes, kindWords, valueOfWord } from './characteristic-words.ts';

/** Columns that are typed; the limits beside them are worked out. */
export const tableColumns = [
  'balloon',
  'sheet',
  'zone',
  'description',
  'kind',
  'nominal',
  'tolerance',
  'unit',
  'decimals',
  'class',
  'method',
] as const;
export type TableColumn = (typeof tableColumns)[number];

/** What the form sets and the table only carries. */
export interface RowDetails {
  readonly geometric: GeometricSpec | null;
  readonly attributeAllowed: boolean | null;
  readonly pieces: number | null;
  readonly controlledBy: readonly string[];
  readonly note: string;
}

export interface TableRow {
  /** The same while the row is on the page, saved or not. */
  readonly key: string;
  readonly id: string | null;
  readonly version: number | null;
  readonly cells: Readonly<Record<TableColumn, string>>;
  readonly details: RowDetails;
}

export const noDetails: RowDetails = {
  geometric: null,
  attributeAllowed: null,
  pieces: null,
  controlledBy: [],
  note: '',
};

export function emptyRow(key: string, balloon: string, unit: string): TableRow {
  const cells = Object.fromEntries(tableColumns.map((column) => [column, ''])) as Record<TableColumn, string>;
  return {
    key,
    id: null,
    version: null,
    cells: { ...cells, balloon, unit, kind: 'size' },
    details: noDetails,
  };
}

/** A row that was added and not begun: nothing in it asks to be saved or mended. */
export function isBlank({ id, cells, details }: TableRow): boolean {
  const begun = tableColumns.some(
    (column) => !['balloon', 'kind', 'unit'].includes(column) && cells[column] !== '',
  );
  return id === null && !begun && details === noDetails;
}

export function rowOf(item: CharacteristicResponse): TableRow {
  const { nominal, tolerance } = writeTolerance(item.tolerance, item.kind === 'geometric');
  return {
    key: item.id,
    id: item.id,
    version: item.version,
    cells: {
      balloon: item.balloon,
      sheet: item.sheet,
      zone: item.zone,
      description: item.description,
      kind: kindWords[item.kind],
      nominal,
      tolerance,
      unit: item.unit,
      decimals: String(item.decimals),
      class: item.class === 'none' ? '' : classWords[item.class],
      method: item.method,
    },
    details: {
      geometric: item.geometric,
      attributeAllowed: item.attributeAllowed,
      pieces: item.pieces,
      controlledBy: item.controlledBy,
      note: item.note,
    },
  };
}

export interface RowFault {
  readonly column: TableColumn;
  readonly message: string;
}

export interface CheckedRow {
  /** Null while something is wrong. */
  readonly input: CharacteristicInput | null;
  readonly limits: ToleranceLimits | null;
  readonly faults: readonly RowFault[];
}

/** The row as the server will take it, its limits worked out at once, or what is wrong in which cell. */
export function checkRow({ cells, details }: TableRow): CheckedRow {
  const faults: RowFault[] = [];
  const fault = (column: TableColumn, message: string) => void faults.push({ column, message });
  const kind = valueOfWord(kindWords, cells.kind);
  if (kind === null) fault('kind', `Write one of: ${Object.values(kindWords).join(', ')}.`);
  const characteristicClass = cells.class.trim() === '' ? 'none' : valueOfWord(classWords, cells.class);
  if (characteristicClass === null) fault('class', `Write one of: ${Object.values(classWords).join(', ')}.`);
  const read = readTolerance({
    nominal: localToPoint(cells.nominal),
    tolerance: localToPoint(cells.tolerance),
    geometric: kind === 'geometric',
  });
  if (isUndetermined(read))
    fault(
      read.code.startsWith('nominal') || read.code === 'no-nominal' ? 'nominal' : 'tolerance',
      `${read.reason}.`,
    );
  const unit = unitSymbols.find((symbol) => symbol === (cells.unit.trim() || '1'));
  if (!unit) fault('unit', `Write one of: ${unitSymbols.join(', ')}.`);
  const limits = isUndetermined(read) || !unit ? null : statedLimits(read.stated, unit);
  if (isUndetermined(limits)) fault('tolerance', `${limits.reason}.`);
  const resolved = isUndetermined(limits) ? null : limits;
  const decimals = cells.decimals.trim() === '' ? decimalsOf(resolved) : Number(cells.decimals);
  if (!/^\s*\d?\s*$/.test(cells.decimals) || decimals > 8)
    fault('decimals', 'Write the digits after the point, 0 to 8.');
  if (faults.length > 0 || isUndetermined(read) || kind === null)
    return { input: null, limits: resolved, faults };
  const parsed = characteristicRequest.safeParse({
    balloon: cells.balloon,
    sheet: cells.sheet,
    zone: cells.zone,
    description: cells.description,
    kind,
    tolerance: read.stated,
    geometric: kind === 'geometric' ? (details.geometric ?? impliedGeometric(cells)) : null,
    unit,
    decimals,
    class: characteristicClass,
    method: cells.method,
    attributeAllowed: details.attributeAllowed ?? (kind === 'attribute' || kind === 'note'),
    pieces: details.pieces,
    controlledBy: [...details.controlledBy],
    note: details.note,
  });
  if (parsed.success) return { input: parsed.data, limits: resolved, faults };
  for (const issue of parsed.error.issues) fault(columnOf(String(issue.path[0] ?? '')), issue.message);
  return { input: null, limits: resolved, faults };
}

/** A reader whose decimal sign is the comma types 12,5; a drawing never groups thousands in a dimension. */
const localToPoint = (text: string): string =>
  /\d,\d/.test(text) && !text.includes('.') ? text.replace(/(\d),(\d)/g, '$1.$2') : text;

function decimalsOf(limits: ToleranceLimits | null): number {
  const texts = limits ? [limits.nominal, limits.lower, limits.upper] : [];
  return Math.min(8, Math.max(0, ...texts.map((text) => text?.split('.')[1]?.length ?? 0)));
}

/** "Flatness of datum A" says which tolerance it is; anything else is a position until the form says otherwise. */
function impliedGeometric(cells: TableRow['cells']): GeometricSpec | null {
  const words = cells.description.trim().toLowerCase();
  const type = geometricTypes.find(
    (name) => words.startsWith(name.replace('-', ' ')) || words.startsWith(name),
  );
  return type
    ? {
        type,
        diametral: /[Ø⌀]/.test(cells.tolerance),
        modifier: 'RFS',
        datums: '',
        feature: 'internal',
        sizeBalloon: null,
      }
    : null;
}

export const columnOf = (field: string): TableColumn =>
  tableColumns.find((column) => column === field) ??
  (field === 'geometric' ? 'kind' : field === 'tolerance' ? 'tolerance' : 'description');
