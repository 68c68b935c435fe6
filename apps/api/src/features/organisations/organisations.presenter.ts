import type { OwnOrganisationResponse, SiteResponse, SupplierResponse } from '@trammel/shared/organisations';
import type { SiteRow, SupplierRow } from './organisations.queries.ts';

export function presentSite(site: Pick<SiteRow, 'id' | 'name' | 'address'>): SiteResponse {
  return { id: site.id, name: site.name, address: site.address };
}

export function presentOwnOrganisation(
  organisation: { id: string; name: string },
  sites: readonly SiteRow[],
): OwnOrganisationResponse {
  return { ...organisation, sites: sites.map(presentSite) };
}

export function presentSuppliers(
  suppliers: readonly SupplierRow[],
  sites: readonly SiteRow[],
): SupplierResponse[] {
  const bySupplier = new Map<string, SiteRow[]>();
  for (const site of sites)
    bySupplier.set(site.organisationId, [...(bySupplier.get(site.organisationId) ?? []), site]);
  return suppliers.map((supplier) => ({
    id: supplier.id,
    name: supplier.name,
    supplierNumber: supplier.supplierNumber,
    linkedAt: supplier.linkedAt,
    state: supplier.waiting ? 'invited' : 'active',
    sites: (bySupplier.get(supplier.id) ?? []).map(presentSite),
  }));
}
