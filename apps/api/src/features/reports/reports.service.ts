import { readStatement } from '../../database/raw.ts';
import { loadCheckInputs } from '../../evidence/check-inputs.ts';
import { declaration, safetyCaution } from '../../evidence/declaration.ts';
import type { Deed } from '../../http/deed.ts';
import { findDeviations } from '../deviations/deviations.queries.ts';
import { findHeadNames, findSignatures } from '../submissions/submission-head.queries.ts';
import { findSubmissionForActor, requireEvidence } from '../submissions/submissions.queries.ts';
import { findDisposition, findOfficialRows, findStatement } from './reports.queries.ts';
import {
  presentDecisionRule,
  presentDeviationLine,
  presentDispositionFacts,
  presentTitle,
} from './reports.presenter.ts';
import type { ReportScene } from './report-scene.ts';
import { requestReasonWords } from './report-words.ts';

/** Everything the documents of a round are made from, for a person who may read its evidence. */
export async function loadReportScene(deed: Deed, submissionId: string): Promise<ReportScene> {
  const { manager } = deed.reader;
  const found = await findSubmissionForActor(manager, deed.actor, submissionId);
  requireEvidence(found);
  const { submission, side } = found;
  const names = await findHeadNames(manager, submissionId);
  const signatures = await findSignatures(manager, submissionId);
  const deviations = await findDeviations(manager, submissionId);
  const disposition = await findDisposition(manager, submissionId);
  const statement = await findStatement(manager, submissionId);
  const isSealed = submission.sealedAt !== null && submission.officialCheckId !== null;
  const officialRows = isSealed ? await findOfficialRows(manager, submission.officialCheckId ?? '') : null;
  const inputs = loadCheckInputs(
    (sql) => readStatement(deed.reader, sql),
    submissionId,
    deed.now.slice(0, 10),
  );
  const safety = inputs.characteristics.list.filter((facts) => facts.class === 'safety-regulatory');
  return {
    title: presentTitle(submission, names),
    reason: requestReasonWords[names.reason],
    decisionRule: presentDecisionRule(names),
    drawing: inputs.submission.drawingSha256 ?? 'no drawing',
    declaration: statement ?? declaration,
    warrant: signatures.warrant,
    disposition: signatures.disposition,
    dispositionFacts: disposition && presentDispositionFacts(disposition, inputs),
    deviations: deviations
      .filter(({ state }) => state !== 'withdrawn' && (side === 'supplier' || state !== 'draft'))
      .map((deviation) => presentDeviationLine(deviation, inputs)),
    findings: { stops: submission.stops, decides: submission.decides, informs: submission.informs },
    caution: safetyCaution(safety.map((facts) => facts.balloon)),
    inputs,
    officialRows,
    madeAt: deed.now,
  };
}
