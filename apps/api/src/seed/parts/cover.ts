import { atLeast, atMost, basic, between, checked, geometric } from './row-words.ts';

/** TD-31880 gear housing cover, moulded in four cavities. */
export const cover = {
  number: 'TD-31880',
  name: 'Gear housing cover',
  material: 'PA66-GF30',
  commodity: 'moulded',
  revision: 'B',
  characteristics: [
    between('1', 'Overall length', '117.7', '118.3', { zone: 'B4' }),
    between('2', 'Overall width', '73.75', '74.25', { zone: 'B6' }),
    between('3', 'Height', '31.35', '31.65', { zone: 'C2' }),
    between('4', 'Boss bore', '19.00', '19.05', { zone: 'C4', class: 'significant' }),
    geometric(
      '5',
      'Position of boss bore',
      '0.15',
      { diametral: true, modifier: 'MMC', datums: 'A|B|C', sizeBalloon: '4' },
      { zone: 'C4' },
    ),
    between('6', 'Screw hole', '4.20', '4.30', { zone: 'B2' }),
    geometric(
      '7',
      'Position of screw holes',
      '0.20',
      { diametral: true, modifier: 'MMC', datums: 'A|B|C', sizeBalloon: '6' },
      { zone: 'B2' },
    ),
    between('8', 'Wall thickness', '2.4', '2.6', { zone: 'D3' }),
    geometric('9', 'Flatness of sealing face', '0.20', { type: 'flatness' }, { zone: 'D5' }),
    between('10', 'Seal groove depth', '1.55', '1.65', { zone: 'D5' }),
    between('11', 'Seal groove width', '2.32', '2.48', { zone: 'D5' }),
    between('12', 'Snap hook width', '4.9', '5.1', { zone: 'E2' }),
    atLeast('13', 'Snap hook retention', '45', { kind: 'material-performance', unit: 'N', zone: 'E2' }),
    between('14', 'Draft angle', '0.5', '1.5', { unit: 'deg', zone: 'C2' }),
    between('15', 'Mass', '60.5', '62.5', { kind: 'material-performance', unit: 'g', zone: 'E1' }),
    atMost('16', 'Flash', '0.10', { zone: 'E1' }),
    atMost('17', 'Colour difference to master', '1.0', {
      kind: 'material-performance',
      unit: 'dE',
      zone: 'E1',
    }),
    checked('18', 'Marking legible and complete', 'By eye at 300 mm', { zone: 'E4' }),
    basic('19', 'Hole pattern 52.0 x 28.0', '52.0', ['7'], { zone: 'B2' }),
  ],
};
