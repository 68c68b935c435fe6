import type { ReviewResponse, reviewQuery } from '@trammel/shared/submission-review';
import type { z } from 'zod';
import { readStatement } from '../../database/raw.ts';
import { isSpecial } from '../../evidence/characteristic-facts.ts';
import { slotsByStream } from '../../evidence/row-presenter.ts';
import type { Deed } from '../../http/deed.ts';
import { findSubmissionForActor, requireEvidence, type Side } from '../submissions/submissions.queries.ts';
import { loadScene, type ReviewScene, type SceneRow } from './review-scene.ts';
import { changesSince, type RowChange } from './round-changes.ts';
import { presentReviewRow } from './submission-review.presenter.ts';
import { attention } from './submission-review.rules.ts';

type View = z.output<typeof reviewQuery>;

/** One page of the reviewer's rows, with the counts of every filter. */
export async function findReview(deed: Deed, submissionId: string, view: View): Promise<ReviewResponse> {
  const { manager } = deed.reader;
  const found = await findSubmissionForActor(manager, deed.actor, submissionId);
  requireEvidence(found);
  const prepare = (sql: string) => readStatement(deed.reader, sql);
  const scene = withVisibleMarks(await loadScene(manager, prepare, found.submission), found.side);
  const changes = await changesSince(manager, prepare, found.submission);
  const tests = filters(changes);
  const kept = scene.rows.filter(tests[view.show]);
  if (view.order === 'attention')
    kept.sort((a, b) => attention(a) - attention(b) || a.facts.sequence - b.facts.sequence);
  const slots = slotsByStream(scene.pieces);
  const count = (test: (row: SceneRow) => boolean) =>
    scene.rows.reduce((sum, row) => (test(row) ? sum + 1 : sum), 0);
  return {
    streams: scene.streams,
    pieces: scene.pieces.map(({ slot, ...piece }) => ({ ...piece, sequence: slot + 1 })),
    rows: kept
      .slice(view.offset, view.offset + view.limit)
      .map((row) => presentReviewRow(row, { scene, side: found.side, actor: deed.actor, slots, changes })),
    total: kept.length,
    counts: {
      all: scene.rows.length,
      open: count(tests.open),
      out: count(tests.out),
      undecided: count(tests.undecided),
      special: count(tests.special),
      refused: count(tests.refused),
      questioned: count(tests.questioned),
      changed: count(tests.changed),
      clean: count((row) => row.clean && tests.open(row)),
    },
    packageFindings: packageFindings(scene),
  };
}

/**
 * Until the disposition is signed, marks are the customer's own working state: to the supplier every row is unmarked, in
 * its answers, in the counts and under every filter.
 */
function withVisibleMarks(scene: ReviewScene, side: Side): ReviewScene {
  if (side === 'customer' || scene.submission.decidedAt !== null) return scene;
  return { ...scene, rows: scene.rows.map((row) => ({ ...row, decision: null })) };
}

function filters(
  changes: ReadonlyMap<string, RowChange> | null,
): Record<View['show'], (row: SceneRow) => boolean> {
  return {
    all: () => true,
    open: (row) => (row.decision?.mark ?? null) === null,
    out: (row) => row.verdict === 'out-of-tolerance',
    undecided: (row) => row.verdict === 'undecided',
    special: (row) => isSpecial(row.facts),
    refused: (row) => row.decision?.mark === 'refused',
    questioned: (row) => row.decision?.mark === 'questioned',
    changed: (row) => changes !== null && changes.get(row.facts.id) !== 'same',
  };
}

function packageFindings(scene: ReviewScene) {
  return scene.check.findings.filter((finding) => finding.place.characteristicId === null);
}
