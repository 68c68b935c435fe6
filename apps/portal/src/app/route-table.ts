import type { ComponentType } from 'react';
import type { Permission } from '@trammel/shared/roles';

export interface PortalRoute {
  path: string;
  /** The page's module exports `Component`. */
  lazy: () => Promise<{ Component: ComponentType }>;
  /** Any one of these opens the page; to others it does not exist. */
  needs?: Permission | readonly Permission[];
  /** Open without sign-in. */
  public?: boolean;
  /** Uses the whole width of the window. */
  wide?: boolean;
}

export const routeTable: readonly PortalRoute[] = [
  { path: '/sign-in', public: true, lazy: () => import('./routes/sign-in.tsx') },
  { path: '/forgotten-password', public: true, lazy: () => import('./routes/forgotten-password.tsx') },
  { path: '/invitation/:token', public: true, lazy: () => import('./routes/invitation.tsx') },
  { path: '/password-reset/:token', public: true, lazy: () => import('./routes/password-reset.tsx') },
  { path: '/account', lazy: () => import('./routes/account.tsx') },
  { path: '/worklist', needs: 'request:answer', lazy: () => import('./routes/worklist.tsx') },
  { path: '/review-desk', needs: 'review:decide', lazy: () => import('./routes/review-desk.tsx') },
  { path: '/requests', needs: 'request:read', lazy: () => import('./routes/requests/requests.tsx') },
  { path: '/requests/new', needs: 'request:write', lazy: () => import('./routes/requests/new-request.tsx') },
  {
    path: '/requests/:requestId',
    needs: 'request:read',
    lazy: () => import('./routes/requests/request.tsx'),
  },
  {
    path: '/submissions/:submissionId',
    needs: 'submission:read',
    lazy: () => import('./routes/packages/overview.tsx'),
  },
  {
    path: '/submissions/:submissionId/evidence',
    needs: 'submission:read',
    lazy: () => import('./routes/packages/evidence.tsx'),
  },
  {
    path: '/submissions/:submissionId/measurements',
    needs: 'submission:read',
    wide: true,
    lazy: () => import('./routes/packages/measurements.tsx'),
  },
  {
    path: '/submissions/:submissionId/check',
    needs: 'submission:read',
    lazy: () => import('./routes/packages/check.tsx'),
  },
  {
    path: '/submissions/:submissionId/deviations',
    needs: 'submission:read',
    lazy: () => import('./routes/packages/deviations.tsx'),
  },
  {
    path: '/submissions/:submissionId/warrant',
    needs: 'submission:read',
    lazy: () => import('./routes/packages/warrant.tsx'),
  },
  {
    path: '/submissions/:submissionId/review',
    needs: 'submission:read',
    wide: true,
    lazy: () => import('./routes/packages/review.tsx'),
  },
  {
    path: '/submissions/:submissionId/disposition',
    needs: 'submission:read',
    lazy: () => import('./routes/packages/disposition.tsx'),
  },
  {
    path: '/buying-status',
    needs: 'buying:read',
    wide: true,
    lazy: () => import('./routes/buying-status.tsx'),
  },
  { path: '/buying-status/:lineId', needs: 'buying:read', lazy: () => import('./routes/buying-line.tsx') },
  { path: '/parts', needs: 'part:read', lazy: () => import('./routes/parts/parts.tsx') },
  { path: '/parts/:partId', needs: 'part:read', lazy: () => import('./routes/parts/part.tsx') },
  {
    path: '/parts/:partId/revisions/:revisionId',
    needs: ['part:read', 'request:read'],
    lazy: () => import('./routes/parts/revision.tsx'),
    wide: true,
  },
  {
    path: '/parts/:partId/revisions/:revisionId/import',
    needs: 'part:write',
    lazy: () => import('./routes/parts/import.tsx'),
  },
  {
    path: '/parts/:partId/revisions/:revisionId/comparison',
    needs: 'part:read',
    lazy: () => import('./routes/parts/comparison.tsx'),
  },
  {
    path: '/submissions/:submissionId/import',
    needs: 'measurement:write',
    lazy: () => import('./routes/packages/import.tsx'),
  },
  { path: '/gauges', needs: 'gauge:write', lazy: () => import('./routes/gauges.tsx') },
  { path: '/people', needs: 'people:manage', lazy: () => import('./routes/people.tsx') },
  {
    path: '/suppliers',
    needs: ['links:manage', 'request:write'],
    lazy: () => import('./routes/suppliers.tsx'),
  },
  { path: '/audit', needs: 'audit:read', lazy: () => import('./routes/audit.tsx') },
];
