import { bore } from './package-story.ts';
import { testPassword } from './builders.ts';
import {
  characteristicsCsv,
  deviationFor,
  readingsCsv,
  requestFor,
  type AccessScene,
  type Person,
} from './access-scene.ts';

export interface AccessRow {
  /** Method and path as declared. */
  readonly route: string;
  /** Who may call; everyone else on the five desks is refused with 403. */
  readonly may: readonly Person[] | 'everybody' | 'anonymous';
  /** Answer to the first who may, or to the one named in `as`. */
  readonly right: number;
  readonly as?: Person;
  /** Which id stands for which parameter. */
  readonly ids?: Readonly<Record<string, string>>;
  readonly query?: string | ((scene: AccessScene) => string);
  readonly body?: (scene: AccessScene) => unknown;
  readonly file?: Buffer;
  /** Version in If-Match; 1 unless said otherwise. */
  readonly version?: number;
  /** A list of one's own things: strangers get it too, with nothing of ours. */
  readonly list?: true;
}

const digest = 'a'.repeat(64);
const R: Person[] = ['reviewer'];
const A: Person[] = ['administrator'];
const P: Person[] = ['purchaser'];
const S: Person[] = ['supplier', 'signer'];
const RS: Person[] = [...R, ...S];
const RP: Person[] = [...R, ...P];

const remarks = { remark: '', internalRemark: '' };
const gauge = { code: 'CAL-1', kind: 'Caliper' };
const part = { number: 'TD-9', name: 'Plate' };
const open = { submissionId: 'openSubmission' };
const sent = { submissionId: 'sentSubmission' };
const revision = (scene: AccessScene) => ({
  code: 'A',
  drawingFileId: scene.ids.drawing,
  drawingDate: null,
  changeOrder: '',
  tolerancingStandard: 'iso',
  roundingRule: 'absolute',
  generalTolerance: '',
  note: '',
});
const warrant = {
  runOn: null,
  runHours: null,
  runQuantity: null,
  partMassKg: null,
  productionTool: '',
  materialReport: '',
  exceptions: '',
  comment: '',
};
const request = (scene: AccessScene) => requestFor(scene.story, scene.story.cast.reviewer, scene.ids);
const reading = ({ ids }: AccessScene) => ({
  changes: [{ characteristicId: ids.openCharacteristic, pieceId: ids.openPiece, text: '19.02', was: null }],
});
const piece = ({ ids }: AccessScene) => ({ label: 'p-1', streamId: ids.openStream });
const row = { characteristicId: 'openCharacteristic', streamId: 'openStream' };

/**
 * Every route of the product, in an order in which each finds what it needs. Acts that cannot be undone stand at the end.
 * A right answer of 409, 412 or 422 says that the object was found and another rule spoke.
 */
export const accessTable: readonly AccessRow[] = [
  { route: 'get /demo/people', may: 'anonymous', right: 200 },
  {
    route: 'post /password-resets',
    may: 'anonymous',
    right: 204,
    body: () => ({ email: 'a@works.example' }),
  },
  { route: 'get /account-tokens/:token', may: 'anonymous', right: 404 },
  {
    route: 'post /account-tokens/:token/password',
    may: 'anonymous',
    right: 404,
    body: () => ({ newPassword: 'a long enough sentence to keep' }),
  },
  {
    route: 'post /session',
    may: 'anonymous',
    right: 401,
    body: () => ({ email: 'nobody@works.example', password: testPassword }),
  },
  { route: 'get /session', may: 'everybody', right: 200, list: true },
  { route: 'get /sessions', may: 'everybody', right: 200, list: true },
  { route: 'delete /sessions/:sessionId', may: 'everybody', right: 204, ids: { sessionId: 'spareSession' } },
  { route: 'get /organisation', may: 'everybody', right: 200, list: true },
  { route: 'get /openapi.json', may: 'everybody', right: 200, list: true },
  {
    route: 'put /account/password',
    may: 'everybody',
    right: 422,
    body: () => ({ currentPassword: 'not the one at all', newPassword: 'another long sentence here' }),
    list: true,
  },

  { route: 'get /people', may: A, right: 200, list: true },
  {
    route: 'post /people',
    may: A,
    right: 422,
    body: () => ({ name: 'Twice', email: 'invited@works.example', roles: ['purchasing'] }),
    list: true,
  },
  {
    route: 'put /people/:personId',
    may: A,
    right: 200,
    ids: { personId: 'person' },
    body: () => ({ name: 'Buyer', title: '', roles: ['purchasing'], maySign: false, disabled: false }),
  },
  { route: 'post /people/:personId/invitation', may: A, right: 200, ids: { personId: 'invited' } },
  { route: 'delete /people/:personId/sessions', may: A, right: 204, ids: { personId: 'invited' } },
  { route: 'get /organisation/reviewers', may: R, right: 200, list: true },
  { route: 'post /organisation/sites', may: A, right: 201, body: () => ({ name: 'North' }), list: true },
  { route: 'get /suppliers', may: [...R, ...A], right: 200, list: true },
  {
    route: 'post /suppliers',
    may: A,
    right: 201,
    body: () => ({
      organisationName: 'New foundry',
      siteName: 'Works',
      contactName: 'Contact',
      contactEmail: 'contact@foundry.example',
    }),
    list: true,
  },
  { route: 'get /audit', may: A, right: 200, list: true },
  { route: 'get /audit/verification', may: A, right: 200, list: true },

  { route: 'get /parts', may: R, right: 200, list: true },
  { route: 'post /parts', may: R, right: 201, body: () => ({ ...part, firstRevision: 'A' }), list: true },
  { route: 'get /parts/:partId', may: R, right: 200, ids: { partId: 'sentPart' } },
  {
    route: 'put /parts/:partId',
    may: R,
    right: 200,
    ids: { partId: 'draftPart' },
    body: () => ({ ...part, number: 'TD-4' }),
  },
  {
    route: 'post /parts/:partId/revisions',
    may: R,
    right: 422,
    ids: { partId: 'draftPart' },
    body: () => ({ code: 'A' }),
  },
  { route: 'get /revisions/:revisionId', may: RS, right: 200, ids: { revisionId: 'sentRevision' } },
  {
    route: 'get /revisions/:revisionId/characteristics',
    may: RS,
    right: 200,
    ids: { revisionId: 'sentRevision' },
  },
  {
    route: 'get /revisions/:revisionId/characteristics/export',
    may: RS,
    right: 200,
    ids: { revisionId: 'sentRevision' },
  },
  {
    route: 'get /revisions/:revisionId/comparison',
    may: R,
    right: 200,
    ids: { revisionId: 'sentRevision' },
    query: ({ ids }) => `?with=${ids.sentRevision ?? ''}`,
  },
  { route: 'get /characteristic-template', may: R, right: 200, list: true },
  {
    route: 'put /revisions/:revisionId/characteristics',
    may: R,
    right: 200,
    ids: { revisionId: 'draftRevision' },
    body: () => ({ rows: [] }),
  },
  {
    route: 'post /revisions/:revisionId/characteristics',
    may: R,
    right: 201,
    ids: { revisionId: 'draftRevision' },
    body: () => ({ ...bore, balloon: '5' }),
  },
  {
    route: 'put /characteristics/:characteristicId',
    may: R,
    right: 200,
    ids: { characteristicId: 'draftCharacteristic' },
    body: () => bore,
  },
  {
    route: 'delete /characteristics/:characteristicId',
    may: R,
    right: 204,
    ids: { characteristicId: 'draftCharacteristic' },
    version: 2,
  },
  {
    route: 'post /revisions/:revisionId/characteristic-imports',
    may: R,
    right: 201,
    ids: { revisionId: 'draftRevision' },
    file: characteristicsCsv,
  },
  {
    route: 'post /characteristic-imports/:importId/preview',
    may: R,
    right: 200,
    ids: { importId: 'characteristicImport' },
    body: ({ shown }) => shown.characteristics,
  },
  {
    route: 'post /characteristic-imports/:importId/confirm',
    may: R,
    right: 200,
    ids: { importId: 'characteristicImport' },
  },
  {
    route: 'put /revisions/:revisionId',
    may: R,
    right: 412,
    ids: { revisionId: 'draftRevision' },
    body: revision,
    version: 99,
  },
  {
    route: 'post /revisions/:revisionId/release',
    may: R,
    right: 412,
    ids: { revisionId: 'draftRevision' },
    version: 99,
  },

  { route: 'get /request-elements', may: RS, right: 200, list: true },
  { route: 'get /requests', may: RS, right: 200, list: true },
  { route: 'post /requests', may: R, right: 201, body: request },
  { route: 'get /requests/:requestId', may: RS, right: 200, ids: { requestId: 'sentRequest' } },
  {
    route: 'put /requests/:requestId',
    may: R,
    right: 200,
    ids: { requestId: 'draftRequest' },
    body: request,
  },
  {
    route: 'post /requests/:requestId/withdraw',
    may: R,
    right: 412,
    ids: { requestId: 'openRequest' },
    body: () => ({ reason: 'No longer needed' }),
    version: 99,
  },
  {
    route: 'post /requests/:requestId/issue',
    may: R,
    right: 200,
    ids: { requestId: 'draftRequest' },
    version: 2,
  },
  { route: 'post /requests/:requestId/acknowledge', may: S, right: 409, ids: { requestId: 'sentRequest' } },
  { route: 'get /requests/:requestId/messages', may: RS, right: 200, ids: { requestId: 'sentRequest' } },
  {
    route: 'post /requests/:requestId/messages',
    may: RS,
    right: 201,
    ids: { requestId: 'sentRequest' },
    body: () => ({ kind: 'note', text: 'Which datum?' }),
  },
  { route: 'get /worklist', may: S, right: 200, list: true },
  { route: 'get /review-desk', may: R, right: 200, list: true },
  { route: 'get /submissions/:submissionId', may: RS, right: 200, ids: sent },

  { route: 'get /submissions/:submissionId/pieces', may: RS, right: 200, ids: sent },
  {
    route: 'post /submissions/:submissionId/pieces',
    may: S,
    right: 201,
    ids: open,
    body: (scene) => ({ pieces: [{ ...piece(scene), label: 'extra' }] }),
  },
  { route: 'put /pieces/:pieceId', may: S, right: 200, ids: { pieceId: 'openPiece' }, body: piece },
  { route: 'get /submissions/:submissionId/elements', may: RS, right: 200, ids: sent },
  {
    route: 'put /elements/:elementId',
    may: S,
    right: 412,
    ids: { elementId: 'openElement' },
    body: () => ({ state: 'open', reason: '', statedPart: '', statedRevision: '', dated: null, note: '' }),
    version: 99,
  },
  {
    route: 'post /elements/:elementId/files',
    may: S,
    right: 201,
    ids: { elementId: 'openElement' },
    body: ({ ids }) => ({ fileId: ids.file }),
  },
  {
    route: 'delete /elements/:elementId/files/:fileId',
    may: S,
    right: 200,
    ids: { elementId: 'openElement', fileId: 'file' },
  },
  { route: 'get /gauges', may: S, right: 200, list: true },
  { route: 'post /gauges', may: S, right: 201, body: () => gauge, list: true },
  {
    route: 'put /gauges/:gaugeId',
    may: S,
    right: 412,
    ids: { gaugeId: 'gauge' },
    body: () => ({ ...gauge, code: 'CAL-2' }),
    version: 99,
  },
  {
    route: 'post /submissions/:submissionId/reading-imports',
    may: S,
    right: 201,
    ids: open,
    file: readingsCsv,
  },
  {
    route: 'post /reading-imports/:importId/preview',
    may: S,
    right: 200,
    ids: { importId: 'readingImport' },
    body: ({ shown }) => shown.readings,
  },
  {
    route: 'post /reading-imports/:importId/confirm',
    may: S,
    right: 200,
    ids: { importId: 'readingImport' },
    body: () => ({ conflicts: { choice: 'keep' } }),
  },
  { route: 'get /submissions/:submissionId/measurements', may: RS, right: 200, ids: sent },
  { route: 'put /submissions/:submissionId/readings', may: S, right: 200, ids: open, body: reading },
  {
    route: 'put /submissions/:submissionId/rows/:characteristicId/:streamId',
    may: S,
    right: 412,
    ids: { ...open, ...row },
    body: ({ ids }) => ({ gaugeId: ids.gauge, measuredOn: null, note: '', attribute: null }),
    version: 99,
  },
  {
    route: 'post /submissions/:submissionId/rows',
    may: S,
    right: 200,
    ids: open,
    body: ({ ids }) => ({
      rows: [{ characteristicId: ids.openCharacteristic, streamId: ids.openStream }],
      gaugeId: ids.gauge,
    }),
  },
  { route: 'get /submissions/:submissionId/check', may: RS, right: 200, ids: sent },
  { route: 'post /submissions/:submissionId/check', may: S, right: 201, ids: open },
  { route: 'get /submissions/:submissionId/deviations', may: RS, right: 200, ids: sent },
  {
    route: 'post /submissions/:submissionId/deviations',
    may: S,
    right: 201,
    ids: open,
    body: ({ ids }) => deviationFor(ids.openCharacteristic ?? ''),
  },
  {
    route: 'put /deviations/:deviationId',
    may: S,
    right: 200,
    ids: { deviationId: 'openDeviation' },
    body: ({ ids }) => deviationFor(ids.openCharacteristic ?? ''),
  },
  {
    route: 'post /deviations/:deviationId/withdrawal',
    may: S,
    right: 200,
    ids: { deviationId: 'openDeviation' },
    version: 2,
  },
  {
    route: 'post /deviations/:deviationId/decision',
    may: R,
    right: 200,
    ids: { deviationId: 'sentDeviation' },
    body: () => ({ decision: 'refused', note: 'Not needed' }),
  },
  { route: 'get /submissions/:submissionId/warrant', may: RS, right: 200, ids: sent },
  {
    route: 'put /submissions/:submissionId/warrant',
    may: S,
    right: 412,
    ids: open,
    body: () => warrant,
    version: 9999,
  },
  {
    route: 'post /submissions/:submissionId/warrant/signature',
    may: ['signer'],
    right: 409,
    ids: open,
    body: () => ({ password: testPassword, digest }),
  },
  { route: 'get /submissions/:submissionId/warrant.pdf', may: RS, right: 200, ids: sent },
  { route: 'get /submissions/:submissionId/dimensional-results.pdf', may: RS, right: 200, ids: sent },
  { route: 'get /submissions/:submissionId/dimensional-results.csv', may: RS, right: 200, ids: sent },
  { route: 'get /submissions/:submissionId/dimensional-results.xlsx', may: RS, right: 200, ids: sent },
  { route: 'get /submissions/:submissionId/review', may: RS, right: 200, ids: sent },
  {
    route: 'put /submissions/:submissionId/characteristics/:characteristicId/decision',
    may: R,
    right: 200,
    ids: { ...sent, characteristicId: 'sentCharacteristic' },
    body: () => ({ mark: 'accepted', ...remarks, deviationId: null }),
    version: 0,
  },
  {
    route: 'post /submissions/:submissionId/clean-rows',
    may: R,
    right: 422,
    ids: sent,
    body: ({ ids }) => ({ characteristicIds: [ids.sentCharacteristic] }),
  },
  {
    route: 'put /submissions/:submissionId/elements/:elementId/decision',
    may: R,
    right: 200,
    ids: { ...sent, elementId: 'sentElement' },
    body: () => ({ mark: 'accepted', ...remarks }),
    version: 0,
  },
  { route: 'get /submissions/:submissionId/disposition-draft', may: R, right: 200, ids: sent },
  {
    route: 'post /submissions/:submissionId/disposition',
    may: R,
    right: 412,
    ids: sent,
    body: () => ({ password: testPassword, digest, outcome: 'approved' }),
  },
  {
    route: 'get /submissions/:submissionId/disposition',
    may: RS,
    right: 200,
    ids: { submissionId: 'decidedSubmission' },
  },
  {
    route: 'put /conditions/:conditionId',
    may: RS,
    right: 200,
    ids: { conditionId: 'condition' },
    body: () => ({ state: 'evidence-given', evidence: 'Core changed' }),
  },
  {
    route: 'post /buying-status/:lineId/deliveries',
    may: P,
    right: 201,
    ids: { lineId: 'line' },
    body: () => ({ quantity: 1 }),
  },
  {
    route: 'post /requests/:requestId/resubmission',
    may: S,
    right: 201,
    ids: { requestId: 'decidedRequest' },
  },

  { route: 'get /buying-status', may: RP, right: 200, list: true },
  { route: 'get /buying-status.csv', may: RP, right: 200, list: true },
  { route: 'get /buying-status/:lineId', may: RP, right: 200, ids: { lineId: 'line' } },

  { route: 'post /files', may: RS, right: 201, file: readingsCsv, list: true },
  { route: 'get /files/:fileId', may: RS, right: 200, ids: { fileId: 'sentFile' } },
  { route: 'get /files/:fileId/content', may: RS, right: 200, ids: { fileId: 'sentFile' } },

  {
    route: 'put /submissions/:submissionId/streams/:streamId',
    may: S,
    right: 200,
    ids: { ...open, streamId: 'openStream' },
    body: () => ({ blocked: true, reason: 'Insert broken' }),
  },
  {
    route: 'delete /pieces/:pieceId',
    may: S,
    right: 204,
    ids: { pieceId: 'openPiece' },
    query: '?confirm=readings',
  },
  { route: 'delete /sessions', may: 'everybody', right: 204 },
  { route: 'delete /session', may: 'everybody', as: 'signer', right: 204 },
];
