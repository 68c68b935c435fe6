import { pieceResponse, streamResponse } from '@trammel/shared/measurements';
import { id } from '@trammel/shared/primitives';
import {
  addPiecesRequest,
  attachFileRequest,
  blockStreamRequest,
  changeElementRequest,
  changePieceRequest,
  elementResponse,
  elementsResponse,
  removePieceQuery,
  submissionPiecesResponse,
} from '@trammel/shared/submissions';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { findElements } from './elements.queries.ts';
import { attachFile, changeElement, detachFile } from './elements.service.ts';
import { addPieces, blockStream, changePiece, readPieces, removePiece } from './pieces.service.ts';
import { findSubmissionForActor, requireEvidence } from './submissions.queries.ts';

const ofSubmission = z.strictObject({ submissionId: id });
const ofPiece = z.strictObject({ pieceId: id });
const ofElement = z.strictObject({ elementId: id });

/** Streams, sample pieces and elements of a package. */
export function evidenceRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/pieces',
    permission: 'submission:read',
    summary: 'Streams and sample pieces of a package',
    params: ofSubmission,
    response: submissionPiecesResponse,
    handler: ({ deed, params }) => readPieces(deed, params.submissionId),
  });

  route(router, {
    method: 'post',
    path: '/submissions/:submissionId/pieces',
    permission: 'measurement:write',
    summary: 'Add sample pieces',
    params: ofSubmission,
    body: addPiecesRequest,
    response: submissionPiecesResponse,
    status: 201,
    handler: ({ deed, params, body }) => addPieces(deed, params.submissionId, body.pieces),
  });

  route(router, {
    method: 'put',
    path: '/pieces/:pieceId',
    permission: 'measurement:write',
    summary: 'Change label, date or lot of a sample piece',
    params: ofPiece,
    body: changePieceRequest,
    ifMatch: true,
    response: pieceResponse,
    handler: ({ deed, params, body, version }) => changePiece(deed, params.pieceId, version, body),
  });

  route(router, {
    method: 'delete',
    path: '/pieces/:pieceId',
    permission: 'measurement:write',
    summary: 'Remove a sample piece, and its readings when that is confirmed',
    params: ofPiece,
    query: removePieceQuery,
    response: 'nothing',
    handler: ({ deed, params, query }) => removePiece(deed, params.pieceId, query.confirm === 'readings'),
  });

  route(router, {
    method: 'put',
    path: '/submissions/:submissionId/streams/:streamId',
    permission: 'measurement:write',
    summary: 'Block a stream, or take it back in',
    params: z.strictObject({ submissionId: id, streamId: id }),
    body: blockStreamRequest,
    ifMatch: true,
    response: streamResponse,
    handler: ({ deed, params, body, version }) =>
      blockStream(deed, params.submissionId, params.streamId, version, body),
  });

  route(router, {
    method: 'get',
    path: '/submissions/:submissionId/elements',
    permission: 'submission:read',
    summary: 'Elements of a package with their files and marks',
    params: ofSubmission,
    response: elementsResponse,
    handler: async ({ deed, params }) => {
      const { manager } = deed.reader;
      const found = await findSubmissionForActor(manager, deed.actor, params.submissionId);
      requireEvidence(found);
      return { items: await findElements(manager, params.submissionId, found.side) };
    },
  });

  route(router, {
    method: 'put',
    path: '/elements/:elementId',
    permission: 'measurement:write',
    summary: 'Say how an element is met',
    params: ofElement,
    body: changeElementRequest,
    ifMatch: true,
    response: elementResponse,
    handler: ({ deed, params, body, version }) => changeElement(deed, params.elementId, version, body),
  });

  route(router, {
    method: 'post',
    path: '/elements/:elementId/files',
    permission: 'measurement:write',
    summary: 'Attach an uploaded file to an element',
    params: ofElement,
    body: attachFileRequest,
    response: elementResponse,
    status: 201,
    handler: ({ deed, params, body }) => attachFile(deed, params.elementId, body.fileId),
  });

  route(router, {
    method: 'delete',
    path: '/elements/:elementId/files/:fileId',
    permission: 'measurement:write',
    summary: 'Take a file off an element',
    params: z.strictObject({ elementId: id, fileId: id }),
    response: elementResponse,
    handler: ({ deed, params }) => detachFile(deed, params.elementId, params.fileId),
  });
}
