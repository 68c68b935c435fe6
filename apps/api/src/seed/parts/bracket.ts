import { atLeast, atMost, basic, between, geometric } from './row-words.ts';

/** TD-40256 mounting bracket, stamped and bent; two suppliers make it. */
export const bracket = {
  number: 'TD-40256',
  name: 'Mounting bracket',
  material: 'HC340LA, 2.5 mm, Zn-Ni',
  commodity: 'stamped',
  revision: 'A',
  characteristics: [
    between('1', 'Sheet thickness', '2.37', '2.63', { zone: 'B1' }),
    between('2', 'Width', '63.7', '64.3', { zone: 'B3' }),
    between('3', 'Flange height', '27.75', '28.25', { zone: 'C3', class: 'significant' }),
    between('4', 'Bend angle', '89.25', '90.75', { unit: 'deg', zone: 'C4' }),
    between('5', 'Hole A', '9.00', '9.15', { zone: 'B5' }),
    between('6', 'Hole B', '9.00', '9.15', { zone: 'B6' }),
    geometric(
      '7',
      'Position of hole B',
      '0.40',
      { diametral: true, modifier: 'MMC', datums: 'A|B', sizeBalloon: '6' },
      { zone: 'B6' },
    ),
    between('8', 'Slot width', '8.9', '9.1', { zone: 'D5', class: 'significant' }),
    geometric('9', 'Profile of outline', '0.60', { type: 'profile', datums: 'A|B' }, { zone: 'C6' }),
    atMost('10', 'Burr', '0.15', { zone: 'E1' }),
    atLeast('11', 'Zn-Ni layer', '8', { kind: 'material-performance', unit: 'µm', zone: 'E1' }),
    atLeast('12', 'Weld nut push-out', '6.0', { kind: 'material-performance', unit: 'kN', zone: 'D2' }),
    basic('13', 'Hole distance 40.0', '40.0', ['7'], { zone: 'B6' }),
  ],
};
