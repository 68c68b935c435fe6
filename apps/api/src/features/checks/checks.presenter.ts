import type { CheckResponse } from '@trammel/shared/checks';
import type { StoredCheck } from '../../database/entities/check.entity.ts';
import type { PackageCheck } from '../../evidence/run-check.ts';

/** More findings than a person reads at once; the counts stay whole. */
const shown = 1000;

export function presentCheck(
  submissionId: string,
  kind: CheckResponse['kind'],
  check: PackageCheck,
  inputsDigest: string,
  checkedAt: string,
): CheckResponse {
  const { method, verdict, counts, findings } = check;
  return {
    submissionId,
    kind,
    method,
    inputsDigest,
    checkedAt,
    verdict,
    counts,
    findings: findings.slice(0, shown),
    truncated: findings.length > shown,
  };
}

export function presentStoredCheck(stored: StoredCheck): CheckResponse {
  const { submissionId, method, inputsDigest, checkedAt, verdict, stops, decides, informs, findings } =
    stored;
  return {
    submissionId,
    kind: 'official',
    method,
    inputsDigest,
    checkedAt,
    verdict,
    counts: { stops, decides, informs },
    findings: findings.slice(0, shown),
    truncated: findings.length > shown,
  };
}
