import { queryOptions } from '@tanstack/react-query';
import {
  characteristicsResponse,
  comparisonResponse,
  type CharacteristicTableRequest,
} from '@trammel/shared/characteristics';
import { call } from '../../lib/api-client.ts';

export const characteristicsQuery = (revisionId: string) =>
  queryOptions({
    queryKey: ['characteristics', revisionId],
    queryFn: ({ signal }) =>
      call('GET', `/api/revisions/${revisionId}/characteristics`, characteristicsResponse, { signal }),
  });

export const comparisonQuery = (revisionId: string, withId: string) =>
  queryOptions({
    queryKey: ['comparison', revisionId, withId],
    queryFn: ({ signal }) =>
      call('GET', `/api/revisions/${revisionId}/comparison`, comparisonResponse, {
        query: { with: withId },
        signal,
      }),
  });

export const saveCharacteristics = (revisionId: string, body: CharacteristicTableRequest) =>
  call('PUT', `/api/revisions/${revisionId}/characteristics`, characteristicsResponse, { body });
