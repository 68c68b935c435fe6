import { auditQuery, auditResponse, auditVerification } from '@trammel/shared/audit';
import type { AuditAnchors } from '../../database/audit-anchors.ts';
import type { ApiRouter } from '../../http/api-router.ts';
import { readCursor, writeCursor } from '../../http/cursor.ts';
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
      const before = cursor === undefined ? Number.MAX_SAFE_INTEGER : Number(readCursor(cursor, 1)[0]);
      const rows = findAuditEvents(deed.reader, deed.actor.organisationId, {
        ...filter,
        before,
        limit: limit + 1,
      });
      if (cursor === undefined) await recordReading(deed, filter);
      const last = rows.length > limit ? rows[limit - 1] : undefined;
      return {
        items: rows.slice(0, limit).map(presentAuditEvent),
        nextCursor: last ? writeCursor([last.organisationSequence]) : null,
      };
    },
  });

  route(router, {
    method: 'post',
    path: '/audit/verification',
    permission: 'audit:read',
    summary: 'Check that nothing in the trail was changed or removed',
    response: auditVerification,
    limit: { max: 6, seconds: 60 },
    handler: ({ deed }) => verifyForPeople(deed, anchors),
  });
}
