import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { capabilityStudy } from './capability-study.ts';
import type { CapabilityStudy, CapabilityStudyRequest, ControlFinding } from './capability-study.ts';

/** Readings of one cavity, spindle, die or line, in production order. */
export interface Stream {
  readonly name: string;
  readonly values: readonly number[];
  readonly control?: ControlFinding;
}

export interface StreamStudies {
  readonly method: string;
  readonly byStream: readonly { readonly name: string; readonly study: CapabilityStudy | Undetermined }[];
  /** the stream with the smallest index; the part is as good as its worst stream */
  readonly worst: { readonly name: string; readonly study: CapabilityStudy } | Undetermined;
  /** only when pooling was asked for */
  readonly pooled?: { readonly label: string; readonly study: CapabilityStudy | Undetermined };
}

export interface StreamOptions extends Omit<CapabilityStudyRequest, 'values' | 'control'> {
  /** Pool all streams into one more study. Off by default: a pooled index can hide a bad stream or blame good ones. */
  readonly pool?: boolean;
}

/**
 * Studies streams one by one and names the worst. Pooling happens only on demand, is labelled as such, and is never called capability: the
 * readings of several streams have no common production order to chart.
 */
export function streamStudies(streams: readonly Stream[], options: StreamOptions): StreamStudies {
  const { pool = false, ...shared } = options;
  const byStream = streams.map(({ name, values, control }) => ({
    name,
    study: capabilityStudy({ ...shared, values, ...(control ? { control } : {}) }),
  }));
  const judged = byStream.flatMap(({ name, study }) => (isUndetermined(study) ? [] : [{ name, study }]));
  const worst = judged.reduce<(typeof judged)[number] | undefined>(
    (least, next) => (least && least.study.index <= next.study.index ? least : next),
    undefined,
  );
  const names = streams.map((stream) => stream.name).join(', ');
  return {
    method: 'streams apart, worst stream counts',
    byStream,
    worst: worst ?? undetermined('too-few', 'No stream could be studied'),
    ...(pool
      ? {
          pooled: {
            label: `pooled over ${streams.length} streams (${names}); can hide a bad stream`,
            study: capabilityStudy({ ...shared, values: streams.flatMap((stream) => stream.values) }),
          },
        }
      : {}),
  };
}
