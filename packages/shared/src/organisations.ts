import { z } from 'zod';
import { emailAddress, id, instant, optionalShortText, shortText } from './primitives.ts';

export const siteResponse = z.object({ id, name: z.string(), address: z.string() }).meta({ id: 'Site' });
export type SiteResponse = z.infer<typeof siteResponse>;
export const addSiteRequest = z
  .strictObject({ name: shortText, address: optionalShortText.default('') })
  .meta({ id: 'AddSiteRequest' });

export const supplierResponse = z
  .object({
    id,
    name: z.string(),
    supplierNumber: z.string(),
    sites: z.array(siteResponse),
    linkedAt: instant,
    state: z.enum(['invited', 'active']),
  })
  .meta({ id: 'Supplier' });
export type SupplierResponse = z.infer<typeof supplierResponse>;
export const suppliersResponse = z.object({ items: z.array(supplierResponse) }).meta({ id: 'Suppliers' });

/** Asks an organisation to become a supplier; the named person is invited by mail as its first administrator and signer. */
export const inviteSupplierRequest = z
  .strictObject({
    organisationName: shortText,
    supplierNumber: optionalShortText.default(''),
    siteName: shortText,
    contactName: shortText,
    contactEmail: emailAddress,
  })
  .meta({ id: 'InviteSupplierRequest' });
export type InviteSupplierRequest = z.input<typeof inviteSupplierRequest>;

export const ownOrganisationResponse = z
  .object({ id, name: z.string(), sites: z.array(siteResponse) })
  .meta({ id: 'OwnOrganisation' });
export type OwnOrganisationResponse = z.infer<typeof ownOrganisationResponse>;

/** Colleagues who may be named as reviewers of a request. */
export const reviewerOptionsResponse = z
  .object({ items: z.array(z.object({ id, name: z.string(), title: z.string(), maySign: z.boolean() })) })
  .meta({ id: 'ReviewerOptions' });
