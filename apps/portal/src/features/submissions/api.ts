import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { fileResponse } from '@trammel/shared/documents';
import { pieceResponse, streamResponse } from '@trammel/shared/measurements';
import {
  elementResponse,
  elementsResponse,
  reviewDeskResponse,
  submissionPiecesResponse,
  submissionResponse,
  worklistResponse,
  type ChangeElementRequest,
  type ChangePieceRequest,
  type ElementResponse,
} from '@trammel/shared/submissions';
import { call, callForNothing } from '../../lib/api-client.ts';
import { upload, type UploadOptions } from '../../lib/upload.ts';

export interface DeskView {
  q: string;
  state: string;
  show: string;
  sort: string;
  cursor: string;
}

export const worklistQuery = (view: DeskView) =>
  queryOptions({
    queryKey: ['worklist', view],
    queryFn: ({ signal }) => call('GET', '/api/worklist', worklistResponse, { query: { ...view }, signal }),
    placeholderData: keepPreviousData,
  });

export const reviewDeskQuery = (view: DeskView) =>
  queryOptions({
    queryKey: ['review-desk', view],
    queryFn: ({ signal }) =>
      call('GET', '/api/review-desk', reviewDeskResponse, { query: { ...view }, signal }),
    placeholderData: keepPreviousData,
  });

/** Everything of one package stands under this key, so that one act refreshes the page. */
export const submissionKey = (id: string) => ['submission', id] as const;

export const submissionQuery = (id: string) =>
  queryOptions({
    queryKey: [...submissionKey(id), 'head'],
    queryFn: ({ signal }) => call('GET', `/api/submissions/${id}`, submissionResponse, { signal }),
  });

export const elementsQuery = (id: string) =>
  queryOptions({
    queryKey: [...submissionKey(id), 'elements'],
    queryFn: ({ signal }) => call('GET', `/api/submissions/${id}/elements`, elementsResponse, { signal }),
  });

export const piecesQuery = (id: string) =>
  queryOptions({
    queryKey: [...submissionKey(id), 'pieces'],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${id}/pieces`, submissionPiecesResponse, { signal }),
  });

export function changeElement(
  element: ElementResponse,
  version: number,
  body: ChangeElementRequest,
  keepalive = false,
) {
  return call('PUT', `/api/elements/${element.id}`, elementResponse, { body, version, keepalive });
}

/** Sends a file and hangs it on the element; cancelled before the end, nothing is attached. */
export async function attachFile(elementId: string, file: File, options: UploadOptions) {
  const form = new FormData();
  form.set('file', file);
  const stored = await upload('/api/files?purpose=evidence', form, fileResponse, options);
  options.signal?.throwIfAborted();
  return call('POST', `/api/elements/${elementId}/files`, elementResponse, { body: { fileId: stored.id } });
}

export function detachFile(elementId: string, fileId: string) {
  return call('DELETE', `/api/elements/${elementId}/files/${fileId}`, elementResponse);
}

export function reattachFile(elementId: string, fileId: string) {
  return call('POST', `/api/elements/${elementId}/files`, elementResponse, { body: { fileId } });
}

export function blockStream(
  submissionId: string,
  stream: { id: string; version: number },
  body: { blocked: boolean; reason: string },
) {
  return call('PUT', `/api/submissions/${submissionId}/streams/${stream.id}`, streamResponse, {
    body,
    version: stream.version,
  });
}

export function addPieces(submissionId: string, pieces: ChangePieceRequest[]) {
  return call('POST', `/api/submissions/${submissionId}/pieces`, submissionPiecesResponse, {
    body: { pieces },
  });
}

export function changePiece(piece: { id: string; version: number }, body: ChangePieceRequest) {
  return call('PUT', `/api/pieces/${piece.id}`, pieceResponse, { body, version: piece.version });
}

export function removePiece(pieceId: string, withReadings: boolean) {
  return callForNothing('DELETE', `/api/pieces/${pieceId}`, {
    query: withReadings ? { confirm: 'readings' } : {},
  });
}

export const fileAddress = (fileId: string) => `/api/files/${fileId}/content`;
