import type { CharacteristicRequest } from '@trammel/shared/characteristics';
import type { RevisionResponse } from '@trammel/shared/parts';
import type { RequestResponse, SaveRequestRequest } from '@trammel/shared/requests';
import { Submission } from '../database/entities/submission.entity.ts';
import { elementsOfLevel } from '../features/requests/element-template.ts';
import { buildCast, type Cast } from './builders.ts';
import { aCharacteristic, buildPart, releaseWith } from './part-builders.ts';
import { ifVersion, onceKey, signInAs, type Client } from './sign-in.ts';
import type { TestApp } from './test-app.ts';

export interface Scene {
  readonly cast: Cast;
  readonly reviewer: Client;
  readonly supplier: Client;
  readonly revision: RevisionResponse;
}

/** Rows of a small part: two sizes, one of them special, and a reference dimension. */
export const sceneRows: CharacteristicRequest[] = [
  aCharacteristic({ balloon: '1', description: 'Length' }),
  aCharacteristic({ balloon: '2', description: 'Seat diameter', class: 'critical' }),
  aCharacteristic({
    balloon: '3',
    description: 'Overall length',
    kind: 'reference',
    tolerance: { form: 'none', nominal: '142.0' },
  }),
];

/** A customer with a released part, and a linked supplier. */
export async function buildScene(app: TestApp, rows = sceneRows): Promise<Scene> {
  const cast = await buildCast(app);
  const reviewer = await signInAs(app, cast.reviewer);
  const supplier = await signInAs(app, cast.supplierQuality);
  const part = await buildPart(reviewer);
  const revision = await releaseWith(app, reviewer, cast.reviewer, part.revisions[0]?.id ?? '', rows);
  return { cast, reviewer, supplier, revision };
}

export function requestBody(scene: Scene, overrides: Partial<SaveRequestRequest> = {}): SaveRequestRequest {
  return {
    supplierId: scene.cast.supplier.id,
    siteId: scene.cast.supplier.siteId,
    revisionId: scene.revision.id,
    reason: 'initial',
    level: 3,
    elements: elementsOfLevel(3),
    streamKind: 'spindle',
    streams: ['Spindle 1', 'Spindle 2'],
    piecesPerStream: 3,
    decisionRule: { kind: 'simple' },
    dueOn: '2026-04-15',
    message: 'First parts of the new spindle.',
    reviewerIds: [scene.cast.reviewer.id],
    ...overrides,
  };
}

export async function draftRequest(
  scene: Scene,
  overrides: Partial<SaveRequestRequest> = {},
): Promise<RequestResponse> {
  const answer = await scene.reviewer.post('/api/requests').send(requestBody(scene, overrides)).expect(201);
  return answer.body as RequestResponse;
}

export async function issueDraft(client: Client, draft: RequestResponse): Promise<RequestResponse> {
  const answer = await client
    .post(`/api/requests/${draft.id}/issue`)
    .set(onceKey())
    .set(ifVersion(draft.version))
    .expect(200);
  return answer.body as RequestResponse;
}

/** An issued and acknowledged request: its package lies open on the supplier's desk. */
export async function openPackage(
  scene: Scene,
  overrides: Partial<SaveRequestRequest> = {},
): Promise<{ requestId: string; submissionId: string }> {
  const issued = await issueDraft(scene.reviewer, await draftRequest(scene, overrides));
  await scene.supplier.post(`/api/requests/${issued.id}/acknowledge`).expect(200);
  return { requestId: issued.id, submissionId: issued.rounds[0]?.id ?? '' };
}

/** Puts a round where other deeds would bring it, for what only looks at its state. */
export function placeRound(
  app: TestApp,
  submissionId: string,
  changes: Partial<Submission>,
): Promise<unknown> {
  return app.db.writeTransaction((manager) => manager.update(Submission, { id: submissionId }, changes));
}
