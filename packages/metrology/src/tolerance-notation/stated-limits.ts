import { toleranceLimits } from '../conformance/tolerance-limits.ts';
import type { ToleranceLimits } from '../conformance/tolerance-limits.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { StatedTolerance } from './stated-tolerance.ts';

/**
 * The limits of a stated tolerance in the unit of its row, exactly; see `toleranceLimits`.
 *
 * Undetermined with code `unit-of-table` where a table of a standard is asked for in another unit than its own:
 * ISO 286 fits and ISO 2768-1 sizes are in mm, ISO 2768-1 angles in degrees. Converting first would round.
 */
export function statedLimits(stated: StatedTolerance, unit: string): ToleranceLimits | Undetermined {
  switch (stated.form) {
    case 'limits':
    case 'none': {
      const { nominal, ...rest } = stated;
      return toleranceLimits(nominal === null ? rest : { ...rest, nominal });
    }
    case 'max':
      return toleranceLimits({ form: 'max', upper: stated.upper, naturalZero: stated.zeroBound });
    case 'fit':
      return unit === 'mm' ? toleranceLimits(stated) : wrongUnit('Fits of ISO 286', 'mm', unit);
    case 'general': {
      const angular = stated.feature === 'angular';
      if (angular && unit !== 'deg') return wrongUnit('General tolerances of angles', 'degrees', unit);
      if (!angular && unit !== 'mm') return wrongUnit('General tolerances of ISO 2768-1', 'mm', unit);
      return toleranceLimits(stated);
    }
    default:
      return toleranceLimits(stated);
  }
}

function wrongUnit(table: string, its: string, unit: string): Undetermined {
  return undetermined(
    'unit-of-table',
    `${table} are in ${its} and this row is in ${unit}: state limits or deviations instead`,
  );
}
