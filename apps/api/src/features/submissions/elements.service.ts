import { randomUUID } from 'node:crypto';
import type { ChangeElementRequest, ElementResponse } from '@trammel/shared/submissions';
import type { EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { ElementFile } from '../../database/entities/element-file.entity.ts';
import { StoredFile } from '../../database/entities/stored-file.entity.ts';
import { SubmissionElement } from '../../database/entities/submission-element.entity.ts';
import { changeEvidence } from '../../evidence/refresh-findings.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Invalid, invalidField, NotFound } from '../../http/problems.ts';
import { assertVersion, updateVersioned } from '../../http/versions.ts';
import { findElement, findSubmissionOfElement } from './elements.queries.ts';
import { faultsOfElement, stateAfterFiles } from './elements.rules.ts';
import { requireOpenForSupplier, touchSubmission } from './submissions.queries.ts';

const mostFiles = 50;

export function changeElement(
  deed: Deed,
  elementId: string,
  version: number,
  change: Required<ChangeElementRequest>,
): Promise<ElementResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionOfElement(manager, deed.actor, elementId);
    const submission = requireOpenForSupplier(found);
    const before = await findElement(manager, elementId, found.side);
    assertVersion(before, version, () => before);
    const faults = faultsOfElement({ ...before, files: before.files.length }, change);
    if (faults.length > 0) throw new Invalid(faults);
    await updateVersioned(manager, SubmissionElement, { id: elementId, version }, change, () => before);
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: 'element.changed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Element ${before.label}: ${change.state}`,
      before: pick(before),
      after: change,
    });
    return {
      submissionId: submission.id,
      answer: await findElement(manager, elementId, found.side),
    };
  });
}

/** Hangs an uploaded file on an element. Only a file of one's own organisation can be claimed. */
export function attachFile(deed: Deed, elementId: string, fileId: string): Promise<ElementResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionOfElement(manager, deed.actor, elementId);
    const submission = requireOpenForSupplier(found);
    const element = await findElement(manager, elementId, found.side);
    const file = await manager.findOneBy(StoredFile, {
      id: fileId,
      organisationId: deed.actor.organisationId,
      state: 'stored',
    });
    if (!file) throw invalidField('/fileId', 'There is no such file of yours; upload it first.');
    if (element.files.some((attached) => attached.id === fileId)) {
      throw new Conflict('This file is attached to this element already.');
    }
    if (element.files.length >= mostFiles) {
      throw new Conflict(`An element takes at most ${mostFiles} files.`);
    }
    await manager.insert(ElementFile, {
      id: randomUUID(),
      submissionId: submission.id,
      elementId,
      fileId,
      attachedAt: deed.now,
    });
    await followFiles(manager, element, element.files.length + 1);
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: 'element.file-attached',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Attached ${file.name} to ${element.label}`,
      after: { elementId, fileId, sha256: file.sha256 },
    });
    return {
      submissionId: submission.id,
      answer: await findElement(manager, elementId, found.side),
    };
  });
}

/** Takes a file off an element. The stored file itself stays, for rounds it was submitted with. */
export function detachFile(deed: Deed, elementId: string, fileId: string): Promise<ElementResponse> {
  return changeEvidence(deed, async (manager: EntityManager) => {
    const found = await findSubmissionOfElement(manager, deed.actor, elementId);
    const submission = requireOpenForSupplier(found);
    const element = await findElement(manager, elementId, found.side);
    const file = element.files.find((attached) => attached.id === fileId);
    if (!file) throw new NotFound();
    await manager.delete(ElementFile, { elementId, fileId });
    await followFiles(manager, element, element.files.length - 1);
    await touchSubmission(manager, submission, deed.now);
    appendAudit(manager, deed, {
      action: 'element.file-removed',
      objectType: 'submission',
      objectId: submission.id,
      summary: `Removed ${file.name} from ${element.label}`,
      before: { elementId, fileId, sha256: file.sha256 },
    });
    return {
      submissionId: submission.id,
      answer: await findElement(manager, elementId, found.side),
    };
  });
}

async function followFiles(
  manager: EntityManager,
  element: ElementResponse,
  filesNow: number,
): Promise<void> {
  const state = stateAfterFiles({ ...element, files: element.files.length }, filesNow);
  // Also raises the version: whoever has the element open must see that its files changed.
  await manager.update(SubmissionElement, { id: element.id }, { state });
}

function pick({ state, reason, statedPart, statedRevision, dated, note }: ElementResponse) {
  return { state, reason, statedPart, statedRevision, dated, note };
}
