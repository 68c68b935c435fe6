import { randomUUID } from 'node:crypto';
import type { CharacteristicRequest } from '@trammel/shared/characteristics';
import type { PartResponse, RevisionResponse } from '@trammel/shared/parts';
import { ApprovalRequest } from '../database/entities/request.entity.ts';
import { StoredFile } from '../database/entities/stored-file.entity.ts';
import type { BuiltOrganisation, BuiltUser } from './builders.ts';
import { ifVersion, onceKey, type Client } from './sign-in.ts';
import type { TestApp } from './test-app.ts';

let count = 0;

/** A size row; fields can be given otherwise. */
export function aCharacteristic(overrides: Partial<CharacteristicRequest> = {}): CharacteristicRequest {
  return {
    balloon: '1',
    description: 'Seat diameter',
    kind: 'size',
    tolerance: { form: 'symmetric', nominal: '25.00', tolerance: '0.05' },
    unit: 'mm',
    decimals: 2,
    ...overrides,
  };
}

export async function buildPart(
  client: Client,
  overrides: Record<string, unknown> = {},
): Promise<PartResponse> {
  count += 1;
  const body = {
    number: `TD-9${String(count).padStart(4, '0')}`,
    name: 'Output shaft',
    firstRevision: 'A',
    ...overrides,
  };
  return (await client.post('/api/parts').send(body).expect(201)).body as PartResponse;
}

/** A stored file without bytes behind it: enough for what only names it. */
export function buildFile(app: TestApp, owner: BuiltUser, mediaType = 'application/pdf'): Promise<string> {
  return app.db.writeTransaction(async (manager) => {
    const id = randomUUID();
    await manager.insert(StoredFile, {
      id,
      organisationId: owner.organisationId,
      uploadedById: owner.id,
      uploadedByName: owner.name,
      name: 'drawing.pdf',
      mediaType,
      size: 1000,
      sha256: 'a'.repeat(64),
      objectKey: `tests/${id}`,
      state: 'stored',
      createdAt: app.clock.now(),
    });
    return id;
  });
}

export const revisionFacts = (revision: RevisionResponse, overrides: Record<string, unknown> = {}) => ({
  code: revision.code,
  drawingFileId: revision.drawing?.id ?? null,
  drawingDate: revision.drawingDate,
  changeOrder: revision.changeOrder,
  tolerancingStandard: revision.tolerancingStandard,
  roundingRule: revision.roundingRule,
  generalTolerance: revision.generalTolerance,
  note: revision.note,
  ...overrides,
});

export async function readRevision(client: Client, id: string): Promise<RevisionResponse> {
  return (await client.get(`/api/revisions/${id}`).expect(200)).body as RevisionResponse;
}

/** Puts rows and a drawing on a draft and releases it. */
export async function releaseWith(
  app: TestApp,
  client: Client,
  owner: BuiltUser,
  revisionId: string,
  rows: CharacteristicRequest[] = [aCharacteristic()],
): Promise<RevisionResponse> {
  const table = { rows: rows.map((row) => ({ id: null, version: null, ...row })) };
  await client.put(`/api/revisions/${revisionId}/characteristics`).send(table).expect(200);
  const draft = await readRevision(client, revisionId);
  const drawingFileId = draft.drawing?.id ?? (await buildFile(app, owner));
  await client
    .put(`/api/revisions/${revisionId}`)
    .set(ifVersion(draft.version))
    .send(revisionFacts(draft, { drawingFileId }))
    .expect(200);
  const ready = await readRevision(client, revisionId);
  const answer = await client
    .post(`/api/revisions/${revisionId}/release`)
    .set(ifVersion(ready.version))
    .set(onceKey())
    .expect(200);
  return answer.body as RevisionResponse;
}

/** Asks a supplier for the approval of a revision, as far as reading the drawing needs it. */
export function buildIssuedRequest(
  app: TestApp,
  customer: BuiltUser,
  supplier: BuiltOrganisation,
  revision: { id: string; partId: string },
): Promise<string> {
  return app.db.writeTransaction(async (manager) => {
    const id = randomUUID();
    count += 1;
    await manager.insert(ApprovalRequest, {
      id,
      number: count,
      customerId: customer.organisationId,
      supplierId: supplier.id,
      siteId: supplier.siteId,
      partId: revision.partId,
      revisionId: revision.id,
      state: 'issued',
      reason: 'initial',
      level: 3,
      elements: [],
      streamKind: 'cavity',
      streams: ['1'],
      piecesPerStream: 3,
      decisionRule: { kind: 'simple' },
      dueOn: '2026-04-01',
      createdAt: app.clock.now(),
      createdById: customer.id,
      issuedAt: app.clock.now(),
      issuedById: customer.id,
    });
    return id;
  });
}
