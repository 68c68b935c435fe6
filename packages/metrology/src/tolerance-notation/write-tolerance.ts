import type { StatedTolerance } from './stated-tolerance.ts';

const signed = (text: string): string =>
  /^[+-]/.test(text) || /^0*(?:\.0*)?$/.test(text) ? text : `+${text}`;

/**
 * The two cells of a table that `readTolerance` reads back as the same stated tolerance.
 * `geometric` states a zone by its bare width. Numbers are written as they were stated.
 */
export function writeTolerance(
  stated: StatedTolerance,
  geometric = false,
): { readonly nominal: string; readonly tolerance: string } {
  switch (stated.form) {
    case 'symmetric':
      return { nominal: stated.nominal, tolerance: `±${stated.tolerance.replace(/^\+/, '')}` };
    case 'deviations':
      return { nominal: stated.nominal, tolerance: `${signed(stated.upper)}/${signed(stated.lower)}` };
    case 'limits':
      return { nominal: stated.nominal ?? '', tolerance: `${stated.lower}…${stated.upper}` };
    case 'max':
      if (geometric) return { nominal: '', tolerance: stated.zeroBound ? stated.upper : `≤ ${stated.upper}` };
      return { nominal: '', tolerance: `≤ ${stated.upper}${stated.zeroBound ? ', zero bound' : ''}` };
    case 'min':
      return { nominal: '', tolerance: `≥ ${stated.lower}` };
    case 'fit':
      return { nominal: stated.nominal, tolerance: stated.fitClass };
    case 'general': {
      const feature = { linear: '', 'radius-chamfer': ' radius', angular: ' angular' }[stated.feature];
      const leg = stated.shorterLeg === undefined ? '' : ` leg ${stated.shorterLeg}`;
      return { nominal: stated.nominal, tolerance: `${stated.generalClass}${feature}${leg}` };
    }
    case 'none':
      return { nominal: stated.nominal ?? '', tolerance: '' };
  }
}
