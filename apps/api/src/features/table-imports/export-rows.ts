import { characteristicColumns, type CharacteristicColumn } from '@trammel/shared/table-import';
import { characteristicClasses, characteristicKinds, unitSymbols } from '@trammel/shared/characteristics';
import type { Characteristic } from '../../database/entities/characteristic.entity.ts';
import { columnLabels } from './column-words.ts';

export const exportHeader: readonly string[] = characteristicColumns.map((column) => columnLabels[column]);

const widths: Partial<Record<CharacteristicColumn, number>> = {
  description: 36,
  note: 36,
  balloon: 9,
  sheet: 8,
  zone: 8,
  unit: 8,
  decimals: 9,
};
export const exportWidths: readonly number[] = characteristicColumns.map((column) => widths[column] ?? 15);

const yesNo = (value: boolean): string => (value ? 'yes' : 'no');

/** The row in the columns of the template; what is stated in one of the ways leaves the columns of the others empty. */
export function exportRow(row: Characteristic): string[] {
  const cells: Partial<Record<CharacteristicColumn, string>> = {
    balloon: row.balloon,
    sheet: row.sheet,
    zone: row.zone,
    description: row.description,
    kind: row.kind,
    unit: row.unit,
    decimals: String(row.decimals),
    class: row.class,
    method: row.method,
    attributeAllowed: yesNo(row.attributeAllowed),
    pieces: row.pieces === null ? '' : String(row.pieces),
    controlledBy: row.controlledBy.join(' '),
    note: row.note,
    ...toleranceCells(row),
    ...(row.geometric && {
      geometricType: row.geometric.type,
      diametral: yesNo(row.geometric.diametral),
      modifier: row.geometric.modifier,
      datums: row.geometric.datums,
      feature: row.geometric.feature,
      sizeBalloon: row.geometric.sizeBalloon ?? '',
    }),
  };
  return characteristicColumns.map((column) => cells[column] ?? '');
}

function toleranceCells({ tolerance }: Characteristic): Partial<Record<CharacteristicColumn, string>> {
  switch (tolerance.form) {
    case 'symmetric':
      return { nominal: tolerance.nominal, tolerance: `±${tolerance.tolerance}` };
    case 'deviations':
      return { nominal: tolerance.nominal, upperDeviation: tolerance.upper, lowerDeviation: tolerance.lower };
    case 'limits':
      return { nominal: tolerance.nominal ?? '', lowerLimit: tolerance.lower, upperLimit: tolerance.upper };
    case 'max':
      return { upperLimit: tolerance.upper, zeroBound: yesNo(tolerance.zeroBound) };
    case 'min':
      return { lowerLimit: tolerance.lower };
    case 'fit':
      return { nominal: tolerance.nominal, fitClass: tolerance.fitClass };
    case 'general':
      return {
        nominal: tolerance.nominal,
        generalClass: tolerance.generalClass,
        generalFeature: tolerance.feature,
        shorterLeg: tolerance.shorterLeg ?? '',
      };
    case 'none':
      return { nominal: tolerance.nominal ?? '' };
  }
}

/** What the template says about its columns. */
export const templateLegend: readonly (readonly string[])[] = [
  ['Balloon', 'Number on the drawing: 12, 12a or 12.1. Never given twice.'],
  ['Kind', characteristicKinds.join(', ')],
  [
    'Nominal, tolerance',
    'State the tolerance in one way: Tolerance ±0.1, or upper and lower deviation, or lower and upper limit, or one limit alone, or fit class H7, or general tolerance class f, m, c or v.',
  ],
  ['Unit', unitSymbols.join(', ')],
  ['Class', characteristicClasses.join(', ')],
  ['Material condition', 'RFS, MMC or LMC; with MMC or LMC name the size balloon that gives the bonus.'],
  ['Controlled by', 'Of a basic dimension: the balloons of the geometric rows, parted by spaces.'],
  ['Attribute allowed, zero bound, diametral zone', 'yes or no'],
];

/** Two rows that show the ways; to be written over. */
export const templateRows: readonly (readonly string[])[] = [
  {
    balloon: '1',
    sheet: '1',
    zone: 'B4',
    description: 'Overall length',
    kind: 'size',
    nominal: '142.00',
    tolerance: '±0.20',
    unit: 'mm',
    decimals: '2',
    class: 'none',
  },
  {
    balloon: '2',
    sheet: '1',
    zone: 'C2',
    description: 'Bearing seat',
    kind: 'size',
    nominal: '25',
    fitClass: 'k6',
    unit: 'mm',
    decimals: '3',
    class: 'critical',
  },
].map((cells: Partial<Record<CharacteristicColumn, string>>) =>
  characteristicColumns.map((column) => cells[column] ?? ''),
);
