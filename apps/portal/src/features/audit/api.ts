import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { auditResponse, auditVerification } from '@trammel/shared/audit';
import { call } from '../../lib/api-client.ts';

export interface AuditView {
  q: string;
  objectType: string;
  objectId: string;
  cursor: string;
}

export const auditTrailQuery = (view: AuditView) =>
  queryOptions({
    queryKey: ['audit', view],
    placeholderData: keepPreviousData,
    queryFn: ({ signal }) => call('GET', '/api/audit', auditResponse, { query: { ...view }, signal }),
  });

export const verifyAuditTrail = () => call('GET', '/api/audit/verification', auditVerification);
