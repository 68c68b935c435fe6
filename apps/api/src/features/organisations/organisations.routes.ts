import {
  addSiteRequest,
  inviteSupplierRequest,
  ownOrganisationResponse,
  siteResponse,
  supplierResponse,
  suppliersResponse,
} from '@trammel/shared/organisations';
import type { ApiRouter } from '../../http/api-router.ts';
import { route } from '../../http/route.ts';
import { presentOwnOrganisation, presentSite, presentSuppliers } from './organisations.presenter.ts';
import { findSites, findSuppliers, findSupplierSites } from './organisations.queries.ts';
import { addSite, inviteSupplier } from './organisations.service.ts';

export function organisationsRoutes(router: ApiRouter): void {
  route(router, {
    method: 'get',
    path: '/organisation',
    permission: 'signed-in',
    summary: 'Your organisation and its sites',
    response: ownOrganisationResponse,
    handler: ({ deed: { actor, reader } }) =>
      presentOwnOrganisation(
        { id: actor.organisationId, name: actor.organisationName },
        findSites(reader, actor.organisationId),
      ),
  });

  route(router, {
    method: 'post',
    path: '/organisation/sites',
    permission: 'people:manage',
    summary: 'Add a site',
    body: addSiteRequest,
    response: siteResponse,
    status: 201,
    handler: async ({ deed, body }) => presentSite(await addSite(deed, body)),
  });

  route(router, {
    method: 'get',
    path: '/suppliers',
    permission: ['request:write', 'links:manage'],
    summary: 'Suppliers of your organisation and their sites',
    response: suppliersResponse,
    handler: ({ deed: { actor, reader } }) => ({
      items: presentSuppliers(
        findSuppliers(reader, actor.organisationId),
        findSupplierSites(reader, actor.organisationId),
      ),
    }),
  });

  route(router, {
    method: 'post',
    path: '/suppliers',
    permission: 'links:manage',
    summary: 'Invite a supplier',
    body: inviteSupplierRequest,
    response: supplierResponse,
    status: 201,
    idempotent: true,
    handler: ({ deed, body }) => inviteSupplier(deed, body),
  });
}
