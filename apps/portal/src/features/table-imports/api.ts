import {
  characteristicImportPreview,
  importConfirmed,
  readingImportPreview,
  type ConfirmReadingImportRequest,
  type RemapCharacteristicsRequest,
  type RemapReadingsRequest,
} from '@trammel/shared/table-import';
import { submissionPiecesResponse } from '@trammel/shared/submissions';
import { queryOptions } from '@tanstack/react-query';
import { call, type Parser } from '../../lib/api-client.ts';
import { upload } from '../../lib/upload.ts';

export interface Sending {
  readonly onProgress: (sent: number, total: number) => void;
  readonly signal: AbortSignal;
}

function sendTable<T>(path: string, file: File, parser: Parser<T>, sending: Sending): Promise<T> {
  const form = new FormData();
  form.append('file', file);
  return upload(path, form, parser, sending);
}

export const sendCharacteristics = (revisionId: string, file: File, sending: Sending) =>
  sendTable(
    `/api/revisions/${revisionId}/characteristic-imports`,
    file,
    characteristicImportPreview,
    sending,
  );

export const remapCharacteristics = (importId: string, body: RemapCharacteristicsRequest) =>
  call('POST', `/api/characteristic-imports/${importId}/preview`, characteristicImportPreview, { body });

export const confirmCharacteristics = (importId: string, idempotencyKey: string) =>
  call('POST', `/api/characteristic-imports/${importId}/confirm`, importConfirmed, { idempotencyKey });

export const sendReadings = (submissionId: string, file: File, sending: Sending) =>
  sendTable(`/api/submissions/${submissionId}/reading-imports`, file, readingImportPreview, sending);

export const remapReadings = (importId: string, body: RemapReadingsRequest) =>
  call('POST', `/api/reading-imports/${importId}/preview`, readingImportPreview, { body });

export const confirmReadings = (
  importId: string,
  body: ConfirmReadingImportRequest,
  idempotencyKey: string,
) => call('POST', `/api/reading-imports/${importId}/confirm`, importConfirmed, { body, idempotencyKey });

export const piecesQuery = (submissionId: string) =>
  queryOptions({
    queryKey: ['pieces', submissionId],
    queryFn: ({ signal }) =>
      call('GET', `/api/submissions/${submissionId}/pieces`, submissionPiecesResponse, { signal }),
  });
