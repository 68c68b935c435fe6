import { auditQuery, auditResponse, auditVerification } from '@trammel/shared/audit';
import type { AuditAnchors } from '../../database/audit-anchors.ts';
import type { ApiRouter } from '../../http/api-router.ts';
import { decodeCursor, encodeCursor } from '../../http/keyset.ts';
import { route } from '../../http/route.ts';
import { presentAuditEvent } from './audit.presenter.ts';
import { findAuditEvents } from './audit.queries.ts';
import { recordReading, verifyForPeople } from './audit.service.ts';

export function auditRoutes(router: ApiRouter, anchors: AuditAnchors): void {
  route(router, {
    method: 'get',
    path: '/audit',
    permission: 'audit:read',
    summary: 'What was done in your organisation, newest first',
    query: auditQuery,
    response: auditResponse,
    handler: async ({ deed, query: { cursor, limit, ...filter } }) => {
      const place = decodeCursor(cursor, 'newest');
      const before = place === null ? Number.MAX_SAFE_INTEGER : Number(place.value);
      const rows = findAuditEvents(deed.reader, deed.actor.organisationId, {
        ...filter,
        before,
        limit: limit + 1,
      });
      if (place === null) await recordReading(deed, filter);
      const last = rows.length > limit ? rows[limit - 1] : undefined;
      return {
        items: rows.slice(0, limit).map(presentAuditEvent),
        nextCursor: last ? encodeCursor('newest', { value: last.organisationSequence, id: '' }) : null,
      };
    },
  });

  route(router, {
    method: 'get',
    path: '/audit/verification',
    permission: 'audit:read',
    summary: 'Check that nothing in the trail was changed or removed',
    response: auditVerification,
    limit: { max: 6, seconds: 60 },
    handler: ({ deed }) => verifyForPeople(deed, anchors),
  });
}
