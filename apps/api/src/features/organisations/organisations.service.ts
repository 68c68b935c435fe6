import { randomUUID } from 'node:crypto';
import type { addSiteRequest, inviteSupplierRequest, SupplierResponse } from '@trammel/shared/organisations';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { OrganisationLink } from '../../database/entities/organisation-link.entity.ts';
import { Organisation } from '../../database/entities/organisation.entity.ts';
import { Site } from '../../database/entities/site.entity.ts';
import { User } from '../../database/entities/user.entity.ts';
import { issueAccountToken } from '../../http/account-tokens.ts';
import type { Deed } from '../../http/deed.ts';
import { invalidField } from '../../http/problems.ts';
import { enqueueMail } from '../../mail/outbox.ts';
import { supplierInvitationMail } from '../../mail/templates/account-mails.ts';
import { presentSite } from './organisations.presenter.ts';

export function addSite(deed: Deed, command: z.output<typeof addSiteRequest>): Promise<Site> {
  return deed.transact(async (manager) => {
    const organisationId = deed.actor.organisationId;
    if (await manager.existsBy(Site, { organisationId, name: command.name })) {
      throw invalidField('/name', 'There is already a site with this name.');
    }
    const site = manager.create(Site, { id: randomUUID(), organisationId, ...command });
    await manager.insert(Site, site);
    appendAudit(manager, deed, {
      action: 'site.added',
      objectType: 'site',
      objectId: site.id,
      summary: `Site ${site.name} added`,
      after: command,
    });
    return site;
  });
}

/**
 * Sets up a supplier with its first site and person, who is invited by mail as administrator and signer. An address
 * that is known elsewhere gets an account of its own here, so that the answer tells nothing about other customers.
 */
export function inviteSupplier(
  deed: Deed,
  command: z.output<typeof inviteSupplierRequest>,
): Promise<SupplierResponse> {
  return deed.transact(async (manager) => {
    const organisation = { id: randomUUID(), name: command.organisationName, createdAt: deed.now };
    const site = { id: randomUUID(), organisationId: organisation.id, name: command.siteName, address: '' };
    const user = {
      id: randomUUID(),
      organisationId: organisation.id,
      name: command.contactName,
      email: command.contactEmail,
      roles: ['administrator' as const, 'supplier-quality' as const],
      maySign: true,
      createdAt: deed.now,
    };
    await manager.insert(Organisation, organisation);
    await manager.insert(Site, site);
    await manager.insert(User, user);
    await manager.insert(OrganisationLink, {
      id: randomUUID(),
      customerId: deed.actor.organisationId,
      supplierId: organisation.id,
      supplierNumber: command.supplierNumber,
      createdAt: deed.now,
    });
    const token = await issueAccountToken(manager, user.id, 'invitation', deed.now);
    enqueueMail(manager, deed.now, {
      kind: 'supplier-invited',
      recipient: user.email,
      ...supplierInvitationMail(
        { name: user.name, organisationName: organisation.name },
        deed.actor.organisationName,
        `${deed.publicUrl}/invitation/${token}`,
      ),
    });
    appendAudit(manager, deed, {
      action: 'supplier.invited',
      objectType: 'organisation',
      objectId: organisation.id,
      summary: `Supplier ${organisation.name} invited`,
      after: command,
    });
    return {
      id: organisation.id,
      name: organisation.name,
      supplierNumber: command.supplierNumber,
      linkedAt: deed.now,
      state: 'invited' as const,
      sites: [presentSite(site)],
    };
  });
}
