import { atMost, between, checked, fit, geometric, reference } from './row-words.ts';

/** TD-20417 output shaft, turned and ground. */
export const shaft = {
  number: 'TD-20417',
  name: 'Output shaft',
  material: '16MnCr5, case hardened',
  commodity: 'turned',
  revision: 'C',
  characteristics: [
    between('1', 'Overall length', '141.8', '142.2', { zone: 'B4' }),
    between('2', 'Shoulder to end', '37.9', '38.0', { zone: 'B3' }),
    fit('3', 'Bearing seat A', '25', 'k6', { zone: 'C2', class: 'critical' }),
    fit('4', 'Bearing seat B', '25', 'k6', { zone: 'C7', class: 'significant' }),
    fit('5', 'Gear seat', '20', 'h6', { zone: 'C5' }),
    fit('6', 'Keyway width', '8', 'P9', { zone: 'D5' }),
    between('7', 'Keyway depth', '4.0', '4.2', { zone: 'D5' }),
    between('8', 'Groove width', '1.30', '1.44', { zone: 'C6' }),
    between('9', 'Groove diameter', '23.69', '23.90', { zone: 'C6' }),
    geometric(
      '10',
      'Runout of gear seat to A-B',
      '0.015',
      { type: 'runout', datums: 'A-B' },
      { zone: 'D4', class: 'critical' },
    ),
    geometric('11', 'Cylindricity of seat A', '0.006', { type: 'cylindricity' }, { zone: 'C2' }),
    atMost('12', 'Roughness Ra of seat A', '0.8', { zone: 'C2', unit: 'µm' }),
    checked('13', 'Thread M16x1.5-6g', 'Go and no-go ring gauge', { zone: 'B8' }),
    between('14', 'Surface hardness', '58', '62', { kind: 'material-performance', unit: 'HRC', zone: 'E1' }),
    between('15', 'Case depth', '0.60', '0.90', { kind: 'material-performance', zone: 'E1' }),
    reference('16', 'Relief diameter', '27', { zone: 'C3' }),
  ],
};
