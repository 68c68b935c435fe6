import type { PersonResponse } from '@trammel/shared/accounts';
import type { PersonRow } from './people.queries.ts';

export function presentPerson(person: PersonRow): PersonResponse {
  const { id, name, email, title, roles, maySign, lastSeenAt, version } = person;
  return { id, name, email, title, roles, maySign, lastSeenAt, version, state: stateOf(person) };
}

function stateOf(person: PersonRow): PersonResponse['state'] {
  if (person.disabledAt !== null) return 'disabled';
  return person.hasPassword ? 'active' : 'invited';
}
