import type { Permission, Role } from '@trammel/shared/roles';

/** The signed-in person as every deed sees them. The organisation comes from here alone, never from the request. */
export interface Actor {
  readonly userId: string;
  readonly organisationId: string;
  readonly organisationName: string;
  readonly name: string;
  readonly email: string;
  readonly title: string;
  readonly roles: readonly Role[];
  readonly maySign: boolean;
  readonly permissions: ReadonlySet<Permission>;
  readonly sessionId: string;
}
