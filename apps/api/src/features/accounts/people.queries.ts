import type { Role } from '@trammel/shared/roles';
import type { DataSource } from 'typeorm';
import { readStatement } from '../../database/raw.ts';

export interface PersonRow {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly title: string;
  readonly roles: Role[];
  readonly maySign: boolean;
  readonly hasPassword: boolean;
  readonly disabledAt: string | null;
  readonly lastSeenAt: string | null;
  readonly version: number;
}

type Raw = Omit<PersonRow, 'roles' | 'maySign' | 'hasPassword'> & {
  roles: string;
  maySign: number;
  hasPassword: number;
};

const columns = `SELECT u.id, u.name, u.email, u.title, u.roles, u.may_sign AS maySign, u.disabled_at AS disabledAt,
  u.version, u.password_hash IS NOT NULL AS hasPassword,
  (SELECT MAX(s.last_seen_at) FROM sessions s WHERE s.user_id = u.id) AS lastSeenAt FROM users u`;

function fromRaw(row: Raw): PersonRow {
  return {
    ...row,
    roles: JSON.parse(row.roles) as Role[],
    maySign: row.maySign === 1,
    hasPassword: row.hasPassword === 1,
  };
}

export function findPeople(reader: DataSource, organisationId: string): PersonRow[] {
  const sql = `${columns} WHERE u.organisation_id = ? ORDER BY u.name, u.id LIMIT 2000`;
  return (readStatement(reader, sql).all(organisationId) as Raw[]).map(fromRaw);
}

export function findPerson(
  reader: DataSource,
  organisationId: string,
  personId: string,
): PersonRow | undefined {
  const sql = `${columns} WHERE u.organisation_id = ? AND u.id = ?`;
  const row = readStatement(reader, sql).get(organisationId, personId) as Raw | undefined;
  return row && fromRaw(row);
}

/** Who may be named as a reviewer: active quality reviewers of the organisation. */
export function findReviewers(reader: DataSource, organisationId: string): PersonRow[] {
  return findPeople(reader, organisationId).filter(
    (person) => person.disabledAt === null && person.roles.includes('quality-reviewer'),
  );
}
