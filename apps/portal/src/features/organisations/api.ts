import { queryOptions } from '@tanstack/react-query';
import {
  peopleResponse,
  personResponse,
  type InvitePersonRequest,
  type PersonResponse,
} from '@trammel/shared/accounts';
import {
  ownOrganisationResponse,
  siteResponse,
  supplierResponse,
  suppliersResponse,
  type InviteSupplierRequest,
} from '@trammel/shared/organisations';
import { call, callForNothing } from '../../lib/api-client.ts';

export const peopleQuery = queryOptions({
  queryKey: ['people'],
  queryFn: ({ signal }) => call('GET', '/api/people', peopleResponse, { signal }),
});

export const invitePerson = (body: InvitePersonRequest, idempotencyKey: string) =>
  call('POST', '/api/people', personResponse, { body, idempotencyKey });

export interface PersonChange {
  name: string;
  title: string;
  roles: PersonResponse['roles'];
  maySign: boolean;
  disabled: boolean;
}

export const changePerson = (id: string, body: PersonChange, version: number) =>
  call('PUT', `/api/people/${id}`, personResponse, { body, version });

export const inviteAgain = (id: string, idempotencyKey: string) =>
  callForNothing('POST', `/api/people/${id}/invitation`, { idempotencyKey });

export const endSessionsOf = (id: string) => callForNothing('DELETE', `/api/people/${id}/sessions`);

export const suppliersQuery = queryOptions({
  queryKey: ['suppliers'],
  queryFn: ({ signal }) => call('GET', '/api/suppliers', suppliersResponse, { signal }),
});

export const inviteSupplier = (body: InviteSupplierRequest, idempotencyKey: string) =>
  call('POST', '/api/suppliers', supplierResponse, { body, idempotencyKey });

export const ownOrganisationQuery = queryOptions({
  queryKey: ['organisation'],
  queryFn: ({ signal }) => call('GET', '/api/organisation', ownOrganisationResponse, { signal }),
});

export const addSite = (body: { name: string; address: string }) =>
  call('POST', '/api/organisation/sites', siteResponse, { body });
