import type { WarrantFacts } from '@trammel/shared/warrants';
import type { ElementDemand } from '@trammel/shared/requests';
import {
  characteristicsOf,
  judgingRules,
  piecesOf,
  streamsOf,
  type Characteristics,
  type JudgingRules,
  type Piece,
  type Prepare,
  type Stream,
} from './package-context.ts';
import { storedRowColumns, type StoredRow } from './stored-row.ts';

export interface CheckedGauge {
  readonly id: string;
  readonly code: string;
  readonly resolution: string | null;
  readonly unit: string;
  readonly calibratedOn: string | null;
  readonly dueOn: string | null;
}

export interface CheckedElement {
  readonly id: string;
  readonly code: string;
  readonly label: string;
  readonly demand: ElementDemand;
  readonly state: 'open' | 'submitted' | 'kept-at-supplier' | 'not-applicable';
  readonly reason: string;
  readonly statedPart: string;
  readonly statedRevision: string;
  readonly dated: string | null;
  readonly note: string;
  readonly files: {
    readonly id: string;
    readonly name: string;
    readonly size: number;
    readonly sha256: string;
  }[];
}

export interface CheckedDeviation {
  readonly id: string;
  readonly number: number;
  readonly characteristicId: string;
  readonly streamIds: readonly string[];
  readonly rangeLower: string | null;
  readonly rangeUpper: string | null;
  readonly state: 'draft' | 'sent' | 'granted' | 'refused' | 'withdrawn';
  readonly quantity: number | null;
  readonly untilOn: string | null;
}

/** Everything the check looks at; two equal inputs give equal answers. */
export interface CheckInputs {
  readonly submission: {
    readonly id: string;
    readonly round: number;
    readonly partNumber: string;
    readonly revisionCode: string;
    readonly revisionState: 'draft' | 'released' | 'superseded';
    readonly newestRevision: string;
    readonly drawingSha256: string | null;
  };
  readonly rules: JudgingRules;
  readonly characteristics: Characteristics;
  readonly streams: readonly Stream[];
  readonly pieces: readonly Piece[];
  readonly rows: readonly StoredRow[];
  readonly gauges: ReadonlyMap<string, CheckedGauge>;
  readonly elements: readonly CheckedElement[];
  readonly deviations: readonly CheckedDeviation[];
  readonly warrant: WarrantFacts;
  /** Calendar day the check speaks of. */
  readonly today: string;
}

/** Reads a package whole, with one statement a table. */
export function loadCheckInputs(prepare: Prepare, submissionId: string, today: string): CheckInputs {
  const head = prepare(
    `SELECT s.id, s.round, s.request_id AS requestId, s.revision_id AS revisionId, s.part_number AS partNumber,
       s.revision_code AS revisionCode, s.warrant, v.state AS revisionState, f.sha256 AS drawingSha256,
       (SELECT n.code FROM part_revisions n WHERE n.part_id = s.part_id AND n.state = 'released' ORDER BY n.sequence DESC LIMIT 1) AS newestRevision
     FROM submissions s JOIN part_revisions v ON v.id = s.revision_id LEFT JOIN stored_files f ON f.id = v.drawing_file_id
     WHERE s.id = ?`,
  ).get(submissionId) as {
    id: string;
    round: number;
    requestId: string;
    revisionId: string;
    partNumber: string;
    revisionCode: string;
    warrant: string;
    revisionState: 'draft' | 'released' | 'superseded';
    drawingSha256: string | null;
    newestRevision: string | null;
  };
  const { requestId, revisionId, warrant, newestRevision, ...submission } = head;
  return {
    submission: { ...submission, newestRevision: newestRevision ?? submission.revisionCode },
    rules: judgingRules(prepare, requestId),
    characteristics: characteristicsOf(prepare, revisionId),
    streams: streamsOf(prepare, submissionId),
    pieces: piecesOf(prepare, submissionId),
    rows: prepare(
      `SELECT ${storedRowColumns} FROM characteristic_results WHERE submission_id = ? ORDER BY characteristic_id, stream_id`,
    ).all(submissionId) as StoredRow[],
    gauges: gaugesOf(prepare, submissionId),
    elements: elementsOf(prepare, submissionId),
    deviations: deviationsOf(prepare, submissionId),
    warrant: JSON.parse(warrant) as WarrantFacts,
    today,
  };
}

function gaugesOf(prepare: Prepare, submissionId: string): Map<string, CheckedGauge> {
  const rows = prepare(
    `SELECT DISTINCT g.id, g.code, g.resolution, g.unit, g.calibrated_on AS calibratedOn, g.due_on AS dueOn
     FROM gauges g JOIN characteristic_results r ON r.gauge_id = g.id WHERE r.submission_id = ? ORDER BY g.id`,
  ).all(submissionId) as CheckedGauge[];
  return new Map(rows.map((gauge) => [gauge.id, gauge]));
}

function elementsOf(prepare: Prepare, submissionId: string): CheckedElement[] {
  const elements = prepare(
    `SELECT id, code, label, demand, state, reason, stated_part AS statedPart, stated_revision AS statedRevision, dated, note
     FROM submission_elements WHERE submission_id = ? ORDER BY sequence`,
  ).all(submissionId) as Omit<CheckedElement, 'files'>[];
  const files = prepare(
    `SELECT e.element_id AS elementId, f.id, f.name, f.size, f.sha256 FROM element_files e JOIN stored_files f ON f.id = e.file_id
     WHERE e.submission_id = ? ORDER BY e.attached_at, f.id`,
  ).all(submissionId) as (CheckedElement['files'][number] & { elementId: string })[];
  return elements.map((element) => ({
    ...element,
    files: files.filter((file) => file.elementId === element.id).map(({ elementId: _, ...file }) => file),
  }));
}

export function deviationsOf(prepare: Prepare, submissionId: string): CheckedDeviation[] {
  const rows = prepare(
    `SELECT id, number, characteristic_id AS characteristicId, stream_ids AS streamIds, range_lower AS rangeLower,
       range_upper AS rangeUpper, state, quantity, until_on AS untilOn
     FROM deviations WHERE submission_id = ? ORDER BY number`,
  ).all(submissionId) as (Omit<CheckedDeviation, 'streamIds'> & { streamIds: string })[];
  return rows.map((row) => ({ ...row, streamIds: JSON.parse(row.streamIds) as string[] }));
}
