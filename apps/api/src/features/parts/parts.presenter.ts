import type { PartResponse, RevisionResponse } from '@trammel/shared/parts';
import type { StoredFile } from '../../database/entities/stored-file.entity.ts';
import type { Part } from '../../database/entities/part.entity.ts';
import type { Actor } from '../../http/actor.ts';
import type { FoundRevision, RevisionNames, RevisionRow } from './parts.queries.ts';

export function presentPart(part: Part, revisions: readonly RevisionRow[]): PartResponse {
  return {
    id: part.id,
    number: part.number,
    name: part.name,
    material: part.material,
    commodity: part.commodity,
    unitSystem: part.unitSystem,
    safetyOrRegulatory: part.safetyOrRegulatory,
    revisions: revisions.map((row) => ({ ...row, hasDrawing: row.hasDrawing === 1 })),
    version: part.version,
  };
}

function presentFile(file: StoredFile): RevisionResponse['drawing'] {
  return {
    id: file.id,
    name: file.name,
    mediaType: file.mediaType,
    size: file.size,
    sha256: file.sha256,
    uploadedBy: file.uploadedByName,
    uploadedAt: file.createdAt,
  };
}

export function presentRevision(
  { revision, part, side }: FoundRevision,
  names: RevisionNames,
  blockers: readonly string[],
  actor: Actor,
): RevisionResponse {
  const owner = side === 'owner';
  const edit = owner && revision.state === 'draft' && actor.permissions.has('part:write');
  return {
    id: revision.id,
    partId: part.id,
    partNumber: part.number,
    partName: part.name,
    code: revision.code,
    state: revision.state,
    drawing: revision.drawingFile ? presentFile(revision.drawingFile) : null,
    drawingDate: revision.drawingDate,
    changeOrder: revision.changeOrder,
    tolerancingStandard: revision.tolerancingStandard,
    roundingRule: revision.roundingRule,
    generalTolerance: revision.generalTolerance,
    note: revision.note,
    copiedFrom:
      owner && revision.copiedFromId !== null && names.copiedFromCode !== null
        ? { id: revision.copiedFromId, code: names.copiedFromCode }
        : null,
    releasedAt: revision.releasedAt,
    releasedBy: names.releasedBy,
    characteristicCount: names.characteristicCount,
    releaseBlockers: edit ? [...blockers] : [],
    abilities: { edit, release: edit && blockers.length === 0 },
    version: revision.version,
  };
}
