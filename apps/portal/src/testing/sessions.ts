import type { SessionResponse } from '@trammel/shared/accounts';
import { permissionsOf, type Role } from '@trammel/shared/roles';

/** A signed-in person with the permissions that the roles give. */
export function aSession(
  change: { roles?: Role[]; maySign?: boolean; name?: string; id?: string } = {},
): SessionResponse {
  const roles = change.roles ?? ['quality-reviewer'];
  const maySign = change.maySign ?? false;
  return {
    user: {
      id: change.id ?? '6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f0001',
      name: change.name ?? 'Ines Carrow',
      email: 'ines.carrow@tarnfell.example',
      title: 'Quality reviewer',
      roles,
      maySign,
    },
    organisation: { id: '6f1c0b6e-2f0f-4c39-9a53-9d1b6a1f0002', name: 'Tarnfell Drives' },
    permissions: permissionsOf(roles, maySign),
    csrfToken: 'page-token',
    expiresAt: '2026-12-02T06:00:00.000Z',
    demo: true,
  };
}
