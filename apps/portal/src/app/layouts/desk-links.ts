import type { Permission } from '@trammel/shared/roles';
import { paths } from '../../lib/paths.ts';

export interface DeskLink {
  label: string;
  path: string;
  needs: Permission;
}

/** The top bar, in the order of the work; a person sees only what they may open. */
export const deskLinks: readonly DeskLink[] = [
  { label: 'Worklist', path: paths.worklist, needs: 'measurement:write' },
  { label: 'Review desk', path: paths.reviewDesk, needs: 'review:decide' },
  { label: 'Buying status', path: paths.buyingStatus, needs: 'buying:read' },
  { label: 'Requests', path: paths.requests, needs: 'request:read' },
  { label: 'Parts', path: paths.parts, needs: 'part:read' },
  { label: 'Gauges', path: paths.gauges, needs: 'gauge:write' },
  { label: 'Suppliers', path: paths.suppliers, needs: 'links:manage' },
  { label: 'People', path: paths.people, needs: 'people:manage' },
  { label: 'Audit trail', path: paths.audit, needs: 'audit:read' },
];

/** Where a search from the top bar goes: the desks list by part, supplier and request. */
export const searchTargets: readonly DeskLink[] = deskLinks.filter((link) =>
  ([paths.worklist, paths.reviewDesk, paths.buyingStatus] as string[]).includes(link.path),
);
