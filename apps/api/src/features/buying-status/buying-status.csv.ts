import type { BuyingStatusItem } from '@trammel/shared/buying-status';
import { writeCsv } from '../../tables/export-text.ts';

const words = {
  'may-buy': 'may buy',
  'may-buy-within-limits': 'may buy within limits',
  hold: 'hold',
} as const;

const header = [
  'Part',
  'Name',
  'Supplier',
  'Buying verdict',
  'Revision approved',
  'Revision released',
  'Pieces left',
  'Until',
  'What stands in the way',
  'In whose hands',
  'Due',
  'Days waiting',
  'Tooling release',
  'As of (UTC)',
];

export function buyingStatusCsv(items: Iterable<BuyingStatusItem>, asOf: string): string {
  const rows: string[][] = [header];
  for (const item of items) {
    rows.push([
      item.partNumber,
      item.partName,
      item.supplierName,
      words[item.verdict],
      item.approvedRevision ?? '',
      item.currentRevision ?? '',
      item.piecesLeft === null ? '' : String(item.piecesLeft),
      item.until ?? '',
      item.blocker ?? '',
      item.holder ?? '',
      item.dueOn ?? '',
      item.waitingDays === null ? '' : String(item.waitingDays),
      item.toolingRelease ? 'yes' : 'no',
      asOf,
    ]);
  }
  return writeCsv(rows);
}
