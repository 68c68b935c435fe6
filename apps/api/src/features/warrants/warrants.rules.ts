import type { WarrantResponse } from '@trammel/shared/warrants';
import { canonicalJson, sha256Hex } from '../../database/canonical-json.ts';
import type { CheckInputs } from '../../evidence/check-inputs.ts';
import { declaration } from '../../evidence/declaration.ts';
import { packageContent, type PackageCheck } from '../../evidence/run-check.ts';

/** Everything the warrant's signature covers: declaration, limits, readings, verdicts, documents by digest, facts. */
export function warrantContent(
  inputs: CheckInputs,
  check: PackageCheck,
): { canonical: string; digest: string } {
  const canonical = canonicalJson({
    declaration,
    method: check.method,
    package: packageContent(inputs),
    verdicts: check.rows.map((row) => [row.facts.balloon, row.stream.name, row.checked.verdict]),
  });
  return { canonical, digest: sha256Hex(canonical) };
}

export function warrantCounts(inputs: CheckInputs, check: PackageCheck): WarrantResponse['counts'] {
  const covered = check.rows.filter((row) => !row.stream.blocked);
  const rows = (verdict: string) => covered.filter((row) => row.checked.verdict === verdict).length;
  return {
    characteristics: inputs.characteristics.list.length,
    inTolerance: rows('in-tolerance'),
    out: rows('out-of-tolerance'),
    undecided: rows('undecided'),
    deviations: inputs.deviations.filter(
      (deviation) => deviation.state === 'sent' || deviation.state === 'granted',
    ).length,
    elements: inputs.elements.filter((element) => element.demand !== 'not-required').length,
    files: inputs.elements.reduce((count, element) => count + element.files.length, 0),
    safety: inputs.characteristics.list.filter((facts) => facts.class === 'safety-regulatory').length,
  };
}

export function safetyBalloons(inputs: CheckInputs): string[] {
  return inputs.characteristics.list
    .filter((facts) => facts.class === 'safety-regulatory')
    .map((facts) => facts.balloon);
}

/** Why the package cannot be signed and submitted now. */
export function warrantBlockers(check: PackageCheck, maySign: boolean): string[] {
  const blockers: string[] = [];
  const { stops } = check.counts;
  if (stops > 0)
    blockers.push(
      `${stops === 1 ? '1 finding stops' : `${stops} findings stop`} submission. Mend them first; each says how.`,
    );
  if (!maySign) blockers.push('Only a person with the authority to sign for the supplier can submit.');
  return blockers;
}
