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
  { path: '/people', needs: 'people:manage', lazy: () => import('./routes/people.tsx') },
  { path: '/suppliers', needs: 'links:manage', lazy: () => import('./routes/suppliers.tsx') },
  { path: '/audit', needs: 'audit:read', lazy: () => import('./routes/audit.tsx') },
];
