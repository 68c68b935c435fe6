import { buildUser, type BuiltUser } from './builders.ts';
import { bore, bossPosition, marking, PackageStory, smallPdf, wall } from './package-story.ts';
import { onceKey, signInAs, type Client } from './sign-in.ts';

/** Who calls: five desks of the two sides, and two strangers who hold every permission there is. */
export const persons = ['reviewer', 'purchaser', 'administrator', 'supplier', 'signer'] as const;
export type Person = (typeof persons)[number];
export const strangers = ['otherSupplier', 'otherCustomer'] as const;
export type Stranger = (typeof strangers)[number];

/** Ids of everything that a path can name. */
export type Ids = Record<string, string>;

export interface AccessScene {
  readonly story: PackageStory;
  readonly clients: Record<Person | Stranger, Client>;
  readonly ids: Ids;
  /** Settings and columns under which the waiting imports were shown. */
  readonly shown: Record<string, { settings: unknown; mapping: unknown }>;
}

const everyRole = ['administrator', 'quality-reviewer', 'purchasing', 'supplier-quality'] as const;
export const characteristicsCsv = Buffer.from(
  'Balloon,Description,Kind,Nominal,Tolerance,Unit,Decimals\n7,Slot,size,4.00,0.10,mm,2\n',
);
export const readingsCsv = Buffer.from('Characteristic,1,2,3\n1,19.02,19.03,19.04\n');

/**
 * One customer with a package in preparation, one submitted and one with an interim approval, and drafts beside them.
 * Names in `ids` carry the package they belong to: `open`, `sent`, `decided`.
 */
export async function buildAccessScene(): Promise<AccessScene> {
  const story = await PackageStory.begin({ closes: 'caller' });
  const { app, cast, reviewer, supplier } = story;
  const stranger = async (organisation: { id: string }): Promise<Client> =>
    signInAs(app, await buildUser(app, organisation, [...everyRole], { maySign: true }));
  const clients = {
    reviewer,
    supplier,
    signer: story.signer,
    purchaser: story.purchaser,
    administrator: await signInAs(app, cast.customerAdministrator),
    otherSupplier: await stranger(cast.otherSupplier),
    otherCustomer: await stranger(cast.otherCustomer),
  };
  const ids: Ids = {};
  const shown: AccessScene['shown'] = {};
  for (const [kind, number] of [
    ['decided', 'TD-3'],
    ['sent', 'TD-2'],
    ['open', 'TD-1'],
  ] as const) {
    await story.releasePart([bore, bossPosition, wall, marking], number);
    await story.issue();
    await story.acknowledge();
    if (kind !== 'open') await story.prepareClean();
    await noteIds(story, kind, ids);
    if (kind !== 'open') await signed(story);
  }
  await decide(story, ids);
  ids.gauge = await story.nameGauges();
  ids.file = await fileOf(supplier, 'evidence');
  ids.drawing = await fileOf(reviewer, 'drawing');
  await draftThings(story, ids, shown);
  const lines = await story.purchaser.get('/api/buying-status?verdict=may-buy-within-limits').expect(200);
  ids.line = lines.body.items[0].id as string;
  ids.person = cast.purchaser.id;
  const invited = await clients.administrator
    .post('/api/people')
    .set(onceKey())
    .send({ name: 'Invited', email: 'invited@works.example', roles: ['purchasing'] })
    .expect(201);
  ids.invited = invited.body.id as string;
  return { story, clients, ids, shown };
}

async function signed(story: PackageStory): Promise<void> {
  const answer = await story.sign();
  if (answer.status !== 201) throw new Error(`not signed: ${JSON.stringify(answer.body)}`);
}

async function fileOf(client: Client, purpose: string): Promise<string> {
  const sent = await client
    .post(`/api/files?purpose=${purpose}`)
    .attach('file', smallPdf, 'a.pdf')
    .expect(201);
  return sent.body.id as string;
}

/** The ids of one package; a deviation is asked for while that is possible. */
async function noteIds(story: PackageStory, kind: string, ids: Ids): Promise<void> {
  const sheet = await story.sheet();
  const elements = await story.supplier.get(`/api/submissions/${story.submissionId}/elements`).expect(200);
  const plan = elements.body.items.find((item: { code: string }) => item.code === 'control-plan');
  ids[`${kind}Request`] = story.requestId;
  ids[`${kind}Submission`] = story.submissionId;
  ids[`${kind}Part`] = story.partId;
  ids[`${kind}Revision`] = story.revisionId;
  ids[`${kind}Element`] = plan.id as string;
  ids[`${kind}File`] = (plan.files[0]?.id as string | undefined) ?? '';
  ids[`${kind}Stream`] = sheet.streams[0]?.id ?? '';
  ids[`${kind}Piece`] = sheet.pieces[0]?.id ?? '';
  ids[`${kind}Characteristic`] = sheet.characteristics[0]?.id ?? '';
  if (kind === 'decided') return;
  const deviation = await story.supplier
    .post(`/api/submissions/${story.submissionId}/deviations`)
    .set(onceKey())
    .send(deviationFor(ids[`${kind}Characteristic`] ?? ''))
    .expect(201);
  ids[`${kind}Deviation`] = deviation.body.id as string;
}

export const deviationFor = (characteristicId: string) => ({
  characteristicId,
  rangeLower: null,
  rangeUpper: '19.08',
  cause: 'Core worn',
  containment: '100 % check',
  quantity: 100,
  untilOn: null,
});

/** Carries the first package to an interim approval, which alone has conditions. */
async function decide(story: PackageStory, ids: Ids): Promise<void> {
  const later = { submissionId: story.submissionId, requestId: story.requestId };
  story.submissionId = ids.decidedSubmission ?? '';
  await story.acceptAll();
  const answer = await story.dispose({
    outcome: 'interim-approval',
    endOn: story.inDays(60),
    pieceLimit: 1000,
    containment: '100 % check',
    conditions: [{ text: 'New core', owner: 'Toolroom', dueOn: story.inDays(45) }],
  });
  if (answer.status !== 201) throw new Error(`not decided: ${JSON.stringify(answer.body)}`);
  ids.condition = answer.body.conditions[0].id as string;
  Object.assign(story, later);
}

/** What only drafts have: characteristics that can change, imports that wait, a request that can be issued. */
async function draftThings(story: PackageStory, ids: Ids, shown: AccessScene['shown']): Promise<void> {
  const { reviewer, supplier, cast } = story;
  const part = await reviewer
    .post('/api/parts')
    .send({ number: 'TD-4', name: 'Plate', firstRevision: 'A' })
    .expect(201);
  ids.draftPart = part.body.id as string;
  ids.draftRevision = part.body.revisions[0].id as string;
  const row = await reviewer
    .post(`/api/revisions/${ids.draftRevision}/characteristics`)
    .send(bore)
    .expect(201);
  ids.draftCharacteristic = row.body.id as string;
  const table = await reviewer
    .post(`/api/revisions/${ids.draftRevision}/characteristic-imports`)
    .attach('file', characteristicsCsv, 'rows.csv')
    .expect(201);
  ids.characteristicImport = table.body.importId as string;
  shown.characteristics = { settings: table.body.settings, mapping: table.body.mapping };
  const readings = await supplier
    .post(`/api/submissions/${ids.openSubmission ?? ''}/reading-imports`)
    .attach('file', readingsCsv, 'readings.csv')
    .expect(201);
  ids.readingImport = readings.body.importId as string;
  shown.readings = { settings: readings.body.settings, mapping: readings.body.mapping };
  for (const name of ['draftRequest', 'withdrawnRequest']) {
    const draft = await reviewer
      .post('/api/requests')
      .send(requestFor(story, cast.reviewer, ids))
      .expect(201);
    ids[name] = draft.body.id as string;
  }
  ids.supplierOrganisation = cast.supplier.id;
  ids.site = cast.supplier.siteId;
  ids.reviewer = cast.reviewer.id;
}

export const requestFor = (story: PackageStory, reviewer: BuiltUser, ids: Ids) => ({
  supplierId: story.cast.supplier.id,
  siteId: story.cast.supplier.siteId,
  revisionId: ids.decidedRevision,
  reason: 'tooling',
  level: 3,
  elements: [{ code: 'control-plan', label: 'Control plan', demand: 'submit' }],
  streams: ['cavity 1'],
  piecesPerStream: 1,
  decisionRule: { kind: 'simple' },
  dueOn: story.inDays(20),
  reviewerIds: [reviewer.id],
});
