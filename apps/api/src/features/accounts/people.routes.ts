import {
  changePersonRequest,
  invitePersonRequest,
  peopleResponse,
  personResponse,
} from '@trammel/shared/accounts';
import { reviewerOptionsResponse } from '@trammel/shared/organisations';
import { id } from '@trammel/shared/primitives';
import { z } from 'zod';
import type { ApiRouter } from '../../http/api-router.ts';
import { NotFound } from '../../http/problems.ts';
import { route } from '../../http/route.ts';
import { presentPerson } from './people.presenter.ts';
import { findPeople, findPerson, findReviewers } from './people.queries.ts';
import { changePerson, endSessionsOf, inviteAgain, invitePerson } from './people.service.ts';

const personParams = z.strictObject({ personId: id });

export function peopleRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/people',
    permission: 'people:manage',
    summary: 'People of your organisation',
    response: peopleResponse,
    handler: ({ deed }) => ({ items: findPeople(deed.reader, deed.actor.organisationId).map(presentPerson) }),
  });

  route(router, {
    method: 'post',
    path: '/people',
    permission: 'people:manage',
    summary: 'Invite a colleague',
    body: invitePersonRequest,
    response: personResponse,
    status: 201,
    idempotent: true,
    handler: ({ deed, body }) => invitePerson(deed, body),
  });

  route(router, {
    method: 'put',
    path: '/people/:personId',
    permission: 'people:manage',
    summary: 'Change roles, authority to sign or access of a colleague',
    params: personParams,
    body: changePersonRequest,
    response: personResponse,
    ifMatch: true,
    handler: async ({ deed, params, version, body }) => {
      await changePerson(deed, params.personId, version, body);
      const person = findPerson(deed.reader, deed.actor.organisationId, params.personId);
      if (!person) throw new NotFound();
      return presentPerson(person);
    },
  });

  route(router, {
    method: 'post',
    path: '/people/:personId/invitation',
    permission: 'people:manage',
    summary: 'Send the invitation again',
    params: personParams,
    response: personResponse,
    idempotent: true,
    handler: ({ deed, params }) => inviteAgain(deed, params.personId),
  });

  route(router, {
    method: 'delete',
    path: '/people/:personId/sessions',
    permission: 'people:manage',
    summary: 'End all sessions of a colleague',
    params: personParams,
    response: 'nothing',
    handler: ({ deed, params }) => endSessionsOf(deed, params.personId),
  });

  route(router, {
    method: 'get',
    path: '/organisation/reviewers',
    permission: 'request:write',
    summary: 'Colleagues who may be named as reviewers',
    response: reviewerOptionsResponse,
    handler: ({ deed }) => ({ items: findReviewers(deed.reader, deed.actor.organisationId) }),
  });
}
