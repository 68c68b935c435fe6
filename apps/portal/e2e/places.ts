import type { APIRequestContext } from 'playwright-core';
import { address } from './fixtures.ts';

interface Row {
  readonly id: string;
  readonly number?: string;
  readonly partNumber?: string;
  readonly requestId?: string;
  readonly revision?: string;
  readonly round?: number;
  readonly supplierName?: string;
}

async function rows(request: APIRequestContext, path: string): Promise<Row[]> {
  const answer = await request.get(path);
  if (!answer.ok()) throw new Error(`${path}: ${answer.status()}`);
  return ((await answer.json()) as { items: Row[] }).items;
}

function the(all: readonly Row[], fits: (row: Row) => boolean, what: string): Row {
  const found = all.find(fits);
  if (!found) throw new Error(`The demonstration has no ${what}`);
  return found;
}

export interface Places {
  readonly bracket: { readonly preparing: string; readonly submitted: string };
  readonly manifold: { readonly approved: string; readonly rejected: string };
  readonly cover: { readonly interim: string; readonly line: string };
  readonly request: { readonly draft: string; readonly issued: string };
  readonly part: { readonly id: string; readonly newest: string; readonly before: string };
  readonly draft: { readonly partId: string; readonly revisionId: string };
}

/** Ids of the demonstration as a reviewer of the customer finds them, and a draft of each kind, which it lacks. */
export async function findPlaces(request: APIRequestContext): Promise<Places> {
  const packages = await rows(request, '/api/review-desk?show=all');
  const round = (part: string, number: number, supplier = '') =>
    the(
      packages,
      (row) =>
        row.partNumber === part &&
        row.round === number &&
        (row.supplierName ?? '').startsWith(supplier) &&
        row.revision !== 'C',
      `${part}, round ${number}`,
    );
  const lines = await rows(request, '/api/buying-status');
  const parts = await rows(request, '/api/parts');
  const manifold = the(parts, (row) => row.number === 'TD-52711', 'manifold');
  const [newest, before] = await revisionsOf(request, manifold.id);
  const preparing = round('TD-40256', 1, 'Askelund');
  const issued = await requestOf(request, preparing.id);
  const draft = await draftPart(request);
  return {
    bracket: { preparing: preparing.id, submitted: round('TD-40256', 2, 'Dunmeric').id },
    manifold: { approved: round('TD-52711', 2).id, rejected: round('TD-52711', 1).id },
    cover: {
      interim: round('TD-31880', 1).id,
      line: the(lines, (row) => row.partNumber === 'TD-31880', 'status of the cover').id,
    },
    request: { draft: await draftRequest(request, issued), issued: issued.id },
    part: { id: manifold.id, newest: newest ?? '', before: before ?? '' },
    draft,
  };
}

async function revisionsOf(request: APIRequestContext, partId: string): Promise<string[]> {
  const part = (await (await request.get(`/api/parts/${partId}`)).json()) as { revisions: Row[] };
  return part.revisions.map((revision) => revision.id);
}

async function requestOf(request: APIRequestContext, submissionId: string) {
  const { requestId } = (await (await request.get(`/api/submissions/${submissionId}`)).json()) as Row;
  const answer = await request.get(`/api/requests/${requestId}`);
  return (await answer.json()) as Record<string, unknown> & { id: string };
}

async function post(request: APIRequestContext, path: string, data: unknown) {
  const session = (await (await request.get('/api/session')).json()) as { csrfToken: string };
  const answer = await request.post(path, {
    data,
    headers: {
      Origin: address,
      'X-CSRF-Token': session.csrfToken,
      'Idempotency-Key': crypto.randomUUID(),
    },
  });
  if (!answer.ok()) throw new Error(`${path}: ${answer.status()} ${await answer.text()}`);
  return (await answer.json()) as { id: string; revisions: Row[] };
}

async function draftPart(request: APIRequestContext): Promise<Places['draft']> {
  const part = await post(request, '/api/parts', {
    number: `TD-6-${Date.now()}`,
    name: 'Bearing cap',
    material: '',
    commodity: '',
    unitSystem: 'metric',
    safetyOrRegulatory: false,
    firstRevision: 'A',
  });
  return { partId: part.id, revisionId: part.revisions[0]?.id ?? '' };
}

interface Asked {
  readonly revision: Row;
  readonly supplier: Row;
  readonly site: Row;
  readonly reviewers: readonly Row[];
  readonly [field: string]: unknown;
}

async function draftRequest(request: APIRequestContext, like: Record<string, unknown>): Promise<string> {
  const { revision, supplier, site, reviewers, ...asked } = like as Asked;
  const fields = [
    'reason',
    'reasonNote',
    'level',
    'elements',
    'streamKind',
    'streams',
    'piecesPerStream',
    'decisionRule',
    'dueOn',
    'message',
    'purchaseOrder',
  ];
  const copied = Object.fromEntries(fields.map((field) => [field, asked[field]]));
  const draft = await post(request, '/api/requests', {
    ...copied,
    revisionId: revision.id,
    supplierId: supplier.id,
    siteId: site.id,
    reviewerIds: reviewers.map((person) => person.id),
  });
  return draft.id;
}
