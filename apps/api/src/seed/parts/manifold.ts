import { atLeast, atMost, basic, between, checked, fit, geometric, reference } from './row-words.ts';

const common = [
  between('1', 'Length', '163.5', '164.5', { zone: 'B4' }),
  between('2', 'Width', '87.5', '88.5', { zone: 'B6' }),
  between('3', 'Height', '59.9', '60.1', { zone: 'C2' }),
  fit('4', 'Spool bore 1', '18', 'H7', { zone: 'C4', class: 'critical' }),
  fit('5', 'Spool bore 2', '18', 'H7', { zone: 'C5', class: 'critical' }),
  between('6', 'Depth of bore 1', '41.9', '42.1', { zone: 'C4' }),
  between('7', 'Depth of bore 2', '41.9', '42.1', { zone: 'C5' }),
  geometric(
    '8',
    'Perpendicularity of bore 1',
    '0.03',
    { type: 'perpendicularity', datums: 'A' },
    { zone: 'C4' },
  ),
  geometric(
    '9',
    'Position of bore 2',
    '0.10',
    { diametral: true, modifier: 'MMC', datums: 'A|B', sizeBalloon: '5' },
    { zone: 'C5' },
  ),
  geometric('10', 'Cylindricity of bore 1', '0.008', { type: 'cylindricity' }, { zone: 'C4' }),
  atMost('11', 'Roughness Ra of bores', '0.8', { unit: 'µm', zone: 'C4' }),
  geometric('12', 'Flatness of mounting face', '0.05', { type: 'flatness' }, { zone: 'D3' }),
  atMost('13', 'Roughness Rz of sealing face', '16', { unit: 'µm', zone: 'D3' }),
  checked('14', 'Port thread G1/4, P1', 'Plug gauge', { zone: 'D6' }),
  checked('15', 'Port thread G1/4, P2', 'Plug gauge', { zone: 'D7' }),
];
const rest = [
  between('18', 'Cross channel', '5.9', '6.1', { zone: 'E3' }),
  atMost('21', 'Leak at 6 bar', '2.0', { kind: 'material-performance', unit: 'ml/min', zone: 'E1' }),
  atLeast('22', 'Hardness', '90', { kind: 'material-performance', unit: 'HBW', zone: 'E1' }),
  checked('23', 'X-ray class', 'Radiograph against the agreed class', { zone: 'E1' }),
  reference('24', 'Outer edge radius', '3', { zone: 'B1' }),
];

/** TD-52711 valve manifold, cast and machined. Revision D moves port P2, deepens the channel and limits a wall. */
export const manifold = {
  number: 'TD-52711',
  name: 'Valve manifold',
  material: 'EN AC-42100-T6',
  commodity: 'cast and machined',
  revision: 'C',
  characteristics: [
    ...common,
    geometric('16', 'Position of port P2', '0.40', { diametral: true, datums: 'A|B' }, { zone: 'D7' }),
    basic('17', 'Distance of port P2', '44.0', ['16'], { zone: 'D7' }),
    between('19', 'Channel depth', '56.2', '56.8', { zone: 'E4' }),
    ...rest,
  ],
};

export const manifoldNext = {
  revision: 'D',
  changed: [
    geometric('16', 'Position of port P2', '0.30', { diametral: true, datums: 'A|B' }, { zone: 'D7' }),
    basic('17', 'Distance of port P2', '46.0', ['16'], { zone: 'D7' }),
    between('19', 'Channel depth', '57.7', '58.3', { zone: 'E4' }),
  ],
  added: [atLeast('20', 'Wall between channel and bore', '3.0', { zone: 'E4' })],
};
