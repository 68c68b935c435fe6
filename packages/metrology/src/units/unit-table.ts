import { ratio } from '../decimal/ratio.ts';
import type { Ratio } from '../decimal/ratio.ts';

/** What a unit measures. Units convert inside one dimension only; each hardness scale is a dimension of its own. */
export type Dimension =
  | 'length'
  | 'angle'
  | 'radian'
  | 'force'
  | 'mass'
  | 'torque'
  | 'pressure'
  | 'temperature'
  | 'time'
  | 'flow'
  | 'ratio'
  | 'hardness-rockwell-a'
  | 'hardness-rockwell-b'
  | 'hardness-rockwell-c'
  | 'hardness-vickers'
  | 'hardness-brinell'
  | 'hardness-shore-a'
  | 'hardness-shore-d'
  | 'colour-difference'
  | 'gloss'
  | 'voltage'
  | 'current'
  | 'resistance'
  | 'count';

/** value in base units = value · factor + offset, all exact. */
export interface Unit {
  readonly symbol: string;
  readonly name: string;
  readonly dimension: Dimension;
  readonly factor: Ratio;
  readonly offset: Ratio;
  readonly aliases: readonly string[];
}

const ZERO = ratio(0n);

function unit(
  symbol: string,
  name: string,
  dimension: Dimension,
  factor: Ratio = ratio(1n),
  aliases: readonly string[] = [],
  offset: Ratio = ZERO,
): Unit {
  return { symbol, name, dimension, factor, offset, aliases };
}

/**
 * Exact factors: international yard and pound agreement of 1959 (1 in = 25.4 mm, 1 lb = 0.45359237 kg), standard
 * acceleration of fall 9.80665 m/s², both as in NIST Special Publication 811 (2008) appendix B; angles and
 * temperature by definition (ISO 80000). Bases: mm, degree, N, kg, N·m, MPa, K, s, ml/min, 1.
 */
export const UNITS: readonly Unit[] = [
  unit('mm', 'millimetre', 'length', ratio(1n), ['millimeter', 'millimetres', 'millimeters']),
  unit('µm', 'micrometre', 'length', ratio(1n, 1000n), ['um', 'μm', 'micron', 'microns', 'micrometer']),
  unit('nm', 'nanometre', 'length', ratio(1n, 1_000_000n), ['nanometer']),
  unit('cm', 'centimetre', 'length', ratio(10n), ['centimeter']),
  unit('m', 'metre', 'length', ratio(1000n), ['meter']),
  unit('in', 'inch', 'length', ratio(254n, 10n), ['inch', 'inches', '"', '″']),
  unit('ft', 'foot', 'length', ratio(3048n, 10n), ['foot', 'feet']),
  unit('mil', 'thousandth of an inch', 'length', ratio(254n, 10_000n), ['thou', 'mils']),
  unit('µin', 'millionth of an inch', 'length', ratio(254n, 10_000_000n), ['uin', 'μin', 'microinch']),
  unit('deg', 'degree of arc', 'angle', ratio(1n), ['°', 'degree', 'degrees']),
  unit('arcmin', 'minute of arc', 'angle', ratio(1n, 60n), ["'", '′', 'minute of arc']),
  unit('arcsec', 'second of arc', 'angle', ratio(1n, 3600n), ["''", 'second of arc']),
  unit('gon', 'gon', 'angle', ratio(9n, 10n), ['grad']),
  unit('rad', 'radian', 'radian', ratio(1n), ['radian', 'radians']),
  unit('mrad', 'milliradian', 'radian', ratio(1n, 1000n), ['milliradian']),
  unit('N', 'newton', 'force', ratio(1n), ['newton']),
  unit('kN', 'kilonewton', 'force', ratio(1000n), ['kilonewton']),
  unit('lbf', 'pound-force', 'force', ratio(44482216152605n, 10_000_000_000_000n), ['pound-force']),
  unit('kgf', 'kilogram-force', 'force', ratio(980665n, 100_000n), ['kp']),
  unit('kg', 'kilogram', 'mass', ratio(1n), ['kilogram']),
  unit('g', 'gram', 'mass', ratio(1n, 1000n), ['gram', 'grams']),
  unit('mg', 'milligram', 'mass', ratio(1n, 1_000_000n), ['milligram']),
  unit('lb', 'pound', 'mass', ratio(45359237n, 100_000_000n), ['pound', 'lbs']),
  unit('oz', 'ounce', 'mass', ratio(45359237n, 1_600_000_000n), ['ounce']),
  unit('N·m', 'newton metre', 'torque', ratio(1n), ['Nm', 'N.m', 'N*m', 'N⋅m']),
  unit('N·cm', 'newton centimetre', 'torque', ratio(1n, 100n), ['Ncm', 'N.cm']),
  unit('N·mm', 'newton millimetre', 'torque', ratio(1n, 1000n), ['Nmm', 'N.mm']),
  unit('lbf·ft', 'pound-force foot', 'torque', ratio(13558179483314004n, 10_000_000_000_000_000n), [
    'lbf.ft',
    'ft·lbf',
    'lb-ft',
    'ft-lb',
  ]),
  unit('lbf·in', 'pound-force inch', 'torque', ratio(1129848290276167n, 10_000_000_000_000_000n), [
    'lbf.in',
    'in·lbf',
    'lb-in',
    'in-lb',
  ]),
  unit('MPa', 'megapascal', 'pressure', ratio(1n), ['N/mm²', 'N/mm2', 'megapascal']),
  unit('kPa', 'kilopascal', 'pressure', ratio(1n, 1000n), ['kilopascal']),
  unit('Pa', 'pascal', 'pressure', ratio(1n, 1_000_000n), ['pascal']),
  unit('GPa', 'gigapascal', 'pressure', ratio(1000n), ['gigapascal']),
  unit('bar', 'bar', 'pressure', ratio(1n, 10n)),
  unit('mbar', 'millibar', 'pressure', ratio(1n, 10_000n), ['hPa']),
  unit('psi', 'pound-force per square inch', 'pressure', ratio(44482216152605n, 6_451_600_000_000_000n), [
    'lbf/in²',
    'lbf/in2',
  ]),
  unit('ksi', 'thousand psi', 'pressure', ratio(44482216152605n, 6_451_600_000_000n)),
  unit('K', 'kelvin', 'temperature', ratio(1n), ['kelvin']),
  unit('°C', 'degree Celsius', 'temperature', ratio(1n), ['degC', 'Celsius'], ratio(27315n, 100n)),
  unit('°F', 'degree Fahrenheit', 'temperature', ratio(5n, 9n), ['degF', 'Fahrenheit'], ratio(45967n, 180n)),
  unit('s', 'second', 'time', ratio(1n), ['sec', 'second', 'seconds']),
  unit('ms', 'millisecond', 'time', ratio(1n, 1000n), ['millisecond']),
  unit('min', 'minute', 'time', ratio(60n), ['minute', 'minutes']),
  unit('h', 'hour', 'time', ratio(3600n), ['hour', 'hours', 'hr']),
  unit('ml/min', 'millilitre per minute', 'flow', ratio(1n), ['mL/min', 'cm³/min', 'cm3/min', 'ccm']),
  unit('l/min', 'litre per minute', 'flow', ratio(1000n), ['L/min', 'lpm']),
  unit('ml/s', 'millilitre per second', 'flow', ratio(60n), ['mL/s', 'cm³/s']),
  unit('1', 'one', 'ratio', ratio(1n)),
  unit('%', 'per cent', 'ratio', ratio(1n, 100n), ['percent', 'pct']),
  unit('‰', 'per thousand', 'ratio', ratio(1n, 1000n), ['permille']),
  unit('ppm', 'parts per million', 'ratio', ratio(1n, 1_000_000n)),
  unit('HRA', 'Rockwell hardness, scale A', 'hardness-rockwell-a'),
  unit('HRB', 'Rockwell hardness, scale B', 'hardness-rockwell-b', ratio(1n), ['HRBW']),
  unit('HRC', 'Rockwell hardness, scale C', 'hardness-rockwell-c'),
  unit('HV', 'Vickers hardness', 'hardness-vickers', ratio(1n), ['HV10', 'HV30']),
  unit('HBW', 'Brinell hardness', 'hardness-brinell', ratio(1n), ['HB']),
  unit('ShA', 'Shore hardness, scale A', 'hardness-shore-a', ratio(1n), ['Shore A']),
  unit('ShD', 'Shore hardness, scale D', 'hardness-shore-d', ratio(1n), ['Shore D']),
  unit('ΔE', 'colour difference', 'colour-difference', ratio(1n), ['dE', 'ΔE*', '∆E', 'Delta E']),
  unit('GU', 'gloss unit', 'gloss'),
  unit('V', 'volt', 'voltage', ratio(1n), ['volt']),
  unit('mV', 'millivolt', 'voltage', ratio(1n, 1000n)),
  unit('A', 'ampere', 'current', ratio(1n), ['amp', 'ampere']),
  unit('mA', 'milliampere', 'current', ratio(1n, 1000n)),
  unit('Ω', 'ohm', 'resistance', ratio(1n), ['ohm', '\u2126']),
  unit('kΩ', 'kiloohm', 'resistance', ratio(1000n), ['kohm', 'k\u2126']),
  unit('mΩ', 'milliohm', 'resistance', ratio(1n, 1000n), ['mohm', 'm\u2126']),
  unit('pcs', 'pieces', 'count', ratio(1n), ['pieces', 'pc', 'ea']),
];
