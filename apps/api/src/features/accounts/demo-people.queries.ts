import type { Role } from '@trammel/shared/roles';
import type { DataSource } from 'typeorm';
import { readStatement } from '../../database/raw.ts';

interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly title: string;
  readonly organisation: string;
  readonly roles: Role[];
}

/**
 * The people of the seed still have the one hash they were given together; salted hashes are equal in no other way. Who
 * was invited later, or has changed the password, is not offered.
 */
export function findDemoPeople(reader: DataSource): DemoPerson[] {
  const rows = readStatement(
    reader,
    `SELECT u.name, u.email, u.title, u.roles, o.name AS organisation
     FROM users u JOIN organisations o ON o.id = u.organisation_id
     WHERE u.disabled_at IS NULL AND u.password_hash IN
       (SELECT password_hash FROM users WHERE password_hash IS NOT NULL GROUP BY password_hash HAVING COUNT(*) > 1)
     ORDER BY u.rowid LIMIT 60`,
  ).all() as (Omit<DemoPerson, 'roles'> & { roles: string })[];
  return rows.map((row) => ({ ...row, roles: JSON.parse(row.roles) as Role[] }));
}
