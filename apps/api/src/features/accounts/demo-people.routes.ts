import { demoPeopleResponse } from '@trammel/shared/accounts';
import type { Role } from '@trammel/shared/roles';
import { demoPassword } from '../../config.ts';
import type { ApiRouter } from '../../http/api-router.ts';
import { NotFound } from '../../http/problems.ts';
import { route } from '../../http/route.ts';
import { findDemoPeople } from './demo-people.queries.ts';

const deskByRole: readonly (readonly [Role, string])[] = [
  ['quality-reviewer', 'Review desk'],
  ['supplier-quality', 'Worklist'],
  ['purchasing', 'Buying status'],
  ['administrator', 'People'],
];

export function demoPeopleRoutes(router: ApiRouter): void {
  const { config, db } = router.core;
  route(router, {
    method: 'get',
    path: '/demo/people',
    permission: 'public',
    summary: 'The invented people of a demonstration; not there in production',
    response: demoPeopleResponse,
    handler: () => {
      if (!config.demo) throw new NotFound();
      const people = findDemoPeople(db.reader).map(({ roles, ...person }) => ({
        ...person,
        desk: deskByRole.find(([role]) => roles.includes(role))?.[1] ?? '',
      }));
      return { password: demoPassword, people };
    },
  });
}
