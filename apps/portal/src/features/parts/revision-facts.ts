import type { ChangeRevisionRequest, RevisionResponse } from '@trammel/shared/parts';

/** What a PUT must repeat so that nothing else of the revision changes. */
export const factsOf = (revision: RevisionResponse): ChangeRevisionRequest => ({
  code: revision.code,
  drawingFileId: revision.drawing?.id ?? null,
  drawingDate: revision.drawingDate,
  changeOrder: revision.changeOrder,
  tolerancingStandard: revision.tolerancingStandard,
  roundingRule: revision.roundingRule,
  generalTolerance: revision.generalTolerance,
  note: revision.note,
});
