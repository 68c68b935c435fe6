/** What the whole story is told with: a part, its characteristics, and the file a measuring machine left. */
export const part = {
  number: `TD-7${String(Date.now()).slice(-4)}`,
  name: 'Guide bush',
  material: 'C45',
  revision: 'A',
};
export const element = 'Material certificate';
export const gauge = 'QT-CMM-2';

/** Balloon, sheet, zone, description, kind, nominal, tolerance, unit, decimals, class, method. */
export const characteristics = [
  ['1', '1', 'B2', 'Length', 'size', '40.00', '±0.20', 'mm', '2', '', 'CMM'],
  ['2', '1', 'B3', 'Bore', 'size', '12.000', '+0.018 0', 'mm', '3', 'critical', 'CMM'],
  ['3', '1', 'C1', 'Width', 'size', '18.00', '±0.10', 'mm', '2', '', 'CMM'],
  ['4', '1', 'C4', 'Groove depth', 'size', '2.00', '±0.05', 'mm', '2', '', 'CMM'],
];

/** As a measuring machine writes it where the comma is the decimal sign; balloon 2 has a slip, balloon 3 is left out. */
export const table = [
  'Balloon;1-1;1-2;1-3;2-1;2-2;2-3',
  '1;40,05;40,02;39,98;40,11;40,07;40,09',
  '2;12,009;12,011;12,080;12,007;12,010;12,012',
  '4;2,01;2,02;1,99;1,91;1,92;1,90',
].join('\r\n');
