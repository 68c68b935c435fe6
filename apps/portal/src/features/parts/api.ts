import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { fileResponse, type FileResponse } from '@trammel/shared/documents';
import {
  partListResponse,
  partResponse,
  revisionResponse,
  type ChangePartRequest,
  type ChangeRevisionRequest,
  type CreatePartRequest,
  type CreateRevisionRequest,
} from '@trammel/shared/parts';
import { call } from '../../lib/api-client.ts';
import { upload } from '../../lib/upload.ts';

export interface PartsView {
  q: string;
  sort: string;
  cursor: string;
}

export const partsQuery = (view: PartsView) =>
  queryOptions({
    queryKey: ['parts', view],
    placeholderData: keepPreviousData,
    queryFn: ({ signal }) => call('GET', '/api/parts', partListResponse, { query: { ...view }, signal }),
  });

export const partQuery = (id: string) =>
  queryOptions({
    queryKey: ['part', id],
    queryFn: ({ signal }) => call('GET', `/api/parts/${id}`, partResponse, { signal }),
  });

export const revisionQuery = (id: string) =>
  queryOptions({
    queryKey: ['revision', id],
    queryFn: ({ signal }) => call('GET', `/api/revisions/${id}`, revisionResponse, { signal }),
  });

export const createPart = (body: CreatePartRequest) => call('POST', '/api/parts', partResponse, { body });

export const changePart = (id: string, version: number, body: ChangePartRequest) =>
  call('PUT', `/api/parts/${id}`, partResponse, { body, version });

export const createRevision = (partId: string, body: CreateRevisionRequest) =>
  call('POST', `/api/parts/${partId}/revisions`, revisionResponse, { body });

export const changeRevision = (id: string, version: number, body: ChangeRevisionRequest) =>
  call('PUT', `/api/revisions/${id}`, revisionResponse, { body, version });

export const releaseRevision = (id: string, version: number, idempotencyKey: string) =>
  call('POST', `/api/revisions/${id}/release`, revisionResponse, { version, idempotencyKey });

export function sendDrawing(
  file: File,
  onProgress: (sent: number, total: number) => void,
  signal: AbortSignal,
): Promise<FileResponse> {
  const form = new FormData();
  form.append('file', file);
  return upload('/api/files?purpose=drawing', form, fileResponse, { onProgress, signal });
}
