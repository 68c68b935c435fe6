import type { RowMark } from '@trammel/shared/submission-review';
import { createSigner } from '../evidence/signing.ts';
import { draftDisposition, signDisposition } from '../features/dispositions/dispositions.service.ts';
import type { Asked } from '../features/dispositions/dispositions.rules.ts';
import { findReview } from '../features/submission-review/submission-review.queries.ts';
import { decideElement } from '../features/submission-review/element-decisions.service.ts';
import { decideCharacteristic } from '../features/submission-review/submission-review.service.ts';
import { findElements } from '../features/submissions/elements.queries.ts';
import { readWarrant, saveWarrant, signWarrant } from '../features/warrants/warrants.service.ts';
import type { WarrantFacts } from '@trammel/shared/warrants';
import type { SeededPackage, Seeding } from './steps.ts';

export async function stateWarrant(
  { cast }: Seeding,
  pack: SeededPackage,
  who: string,
  days: number,
  facts: Omit<WarrantFacts, 'runOn' | 'exceptions' | 'comment'> & Partial<WarrantFacts>,
): Promise<void> {
  const deed = cast.deed(who, days, 15);
  const { version } = await readWarrant(deed, pack.submissionId);
  await saveWarrant(deed, pack.submissionId, version, {
    runOn: cast.date(days - 4),
    exceptions: '',
    comment: '',
    ...facts,
  });
}

export async function signAndSubmit(
  { core, cast }: Seeding,
  pack: SeededPackage,
  signer: string,
  days: number,
): Promise<void> {
  const deed = cast.deed(signer, days, 16);
  const { digest } = await readWarrant(deed, pack.submissionId);
  await signWarrant(deed, createSigner(core.config.secrets.signingKeyPem), pack.submissionId, {
    password: '-',
    digest,
  });
}

export interface Marking {
  readonly mark: RowMark;
  readonly remark?: string;
  readonly internalRemark?: string;
  readonly deviationId?: string;
}

/** Marks every row and element: accepted unless said otherwise by balloon or element code. */
export async function markAll(
  { core, cast }: Seeding,
  pack: SeededPackage,
  days: number,
  special: { rows?: Readonly<Record<string, Marking>>; elements?: Readonly<Record<string, Marking>> } = {},
): Promise<void> {
  const deed = cast.deed('Ines Carrow', days, 10);
  const review = await findReview(deed, pack.submissionId, {
    order: 'balloon',
    show: 'all',
    offset: 0,
    limit: 200,
  });
  for (const row of review.rows) {
    const {
      mark,
      remark = '',
      internalRemark = '',
      deviationId = null,
    } = special.rows?.[row.characteristic.balloon] ?? { mark: 'accepted' as const };
    await decideCharacteristic(
      deed,
      { submissionId: pack.submissionId, characteristicId: row.characteristic.id },
      row.decision.version,
      {
        mark,
        remark,
        internalRemark,
        deviationId,
      },
    );
  }
  for (const element of await findElements(core.db.reader.manager, pack.submissionId, 'customer')) {
    const {
      mark,
      remark = '',
      internalRemark = '',
    } = special.elements?.[element.code] ?? { mark: 'accepted' as const };
    await decideElement(
      deed,
      { submissionId: pack.submissionId, elementId: element.id },
      element.markVersion,
      { mark, remark, internalRemark },
    );
  }
}

const nothingMore = {
  reasons: [],
  conditions: [],
  endOn: null,
  pieceLimit: null,
  containment: '',
  resubmitBy: null,
  comment: '',
};

export async function decide(
  { core, cast }: Seeding,
  pack: SeededPackage,
  days: number,
  asked: Partial<Asked> & Pick<Asked, 'outcome'>,
): Promise<void> {
  const deed = cast.deed('Mirela Haddow', days, 14);
  const { digest } = await draftDisposition(deed, pack.submissionId);
  const signer = createSigner(core.config.secrets.signingKeyPem);
  await signDisposition(deed, signer, pack.submissionId, { ...nothingMore, ...asked, password: '-', digest });
}
