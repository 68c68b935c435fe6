import { randomUUID } from 'node:crypto';
import { permissionsOf, type Role } from '@trammel/shared/roles';
import { OrganisationLink } from '../database/entities/organisation-link.entity.ts';
import { Organisation } from '../database/entities/organisation.entity.ts';
import { Site } from '../database/entities/site.entity.ts';
import { User } from '../database/entities/user.entity.ts';
import type { Actor } from '../http/actor.ts';
import type { Deed } from '../http/deed.ts';
import { PasswordHashing } from '../http/password-hashing.ts';
import type { TestApp } from './test-app.ts';

export const testPassword = 'measure twice and cut once';
let testPasswordHash: Promise<string> | undefined;
let count = 0;

const next = () => (count += 1);

export interface BuiltOrganisation {
  readonly id: string;
  readonly name: string;
  readonly siteId: string;
}

export function buildOrganisation(app: TestApp, name = `Organisation ${next()}`): Promise<BuiltOrganisation> {
  return app.db.writeTransaction(async (manager) => {
    const organisation = { id: randomUUID(), name, createdAt: app.clock.now() };
    await manager.insert(Organisation, organisation);
    const site = { id: randomUUID(), organisationId: organisation.id, name: 'Main works', address: '' };
    await manager.insert(Site, site);
    return { id: organisation.id, name, siteId: site.id };
  });
}

export interface BuiltUser {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly organisationId: string;
}

export async function buildUser(
  app: TestApp,
  organisation: { id: string },
  roles: Role[],
  overrides: Partial<Pick<User, 'name' | 'email' | 'title' | 'maySign' | 'disabledAt' | 'passwordHash'>> = {},
): Promise<BuiltUser> {
  testPasswordHash ??= new PasswordHashing().hash(testPassword);
  const passwordHash = await testPasswordHash;
  const number = next();
  return app.db.writeTransaction(async (manager) => {
    const user = {
      id: randomUUID(),
      organisationId: organisation.id,
      email: `person-${number}@works.example`,
      name: `Person ${number}`,
      title: '',
      roles,
      maySign: false,
      passwordHash,
      createdAt: app.clock.now(),
      ...overrides,
    };
    await manager.insert(User, user);
    return { id: user.id, name: user.name, email: user.email, organisationId: organisation.id };
  });
}

/** Makes one organisation the supplier of another. */
export function buildLink(app: TestApp, customer: { id: string }, supplier: { id: string }): Promise<string> {
  return app.db.writeTransaction(async (manager) => {
    const link = {
      id: randomUUID(),
      customerId: customer.id,
      supplierId: supplier.id,
      createdAt: app.clock.now(),
    };
    await manager.insert(OrganisationLink, link);
    return link.id;
  });
}

export interface Cast {
  readonly customer: BuiltOrganisation;
  readonly supplier: BuiltOrganisation;
  /** Quality reviewer of the customer, may sign. */
  readonly reviewer: BuiltUser;
  readonly purchaser: BuiltUser;
  readonly customerAdministrator: BuiltUser;
  /** Supplier quality, may sign. */
  readonly supplierSigner: BuiltUser;
  readonly supplierQuality: BuiltUser;
  /** Another supplier of the same customer, and another customer: both must see nothing. */
  readonly otherSupplier: BuiltOrganisation;
  readonly otherSupplierQuality: BuiltUser;
  readonly otherCustomer: BuiltOrganisation;
  readonly otherReviewer: BuiltUser;
}

/** Everyone a story needs, strangers included. */
export async function buildCast(app: TestApp): Promise<Cast> {
  const customer = await buildOrganisation(app);
  const supplier = await buildOrganisation(app);
  const otherSupplier = await buildOrganisation(app);
  const otherCustomer = await buildOrganisation(app);
  await buildLink(app, customer, supplier);
  await buildLink(app, customer, otherSupplier);
  return {
    customer,
    supplier,
    otherSupplier,
    otherCustomer,
    reviewer: await buildUser(app, customer, ['quality-reviewer'], { maySign: true }),
    purchaser: await buildUser(app, customer, ['purchasing']),
    customerAdministrator: await buildUser(app, customer, ['administrator']),
    supplierSigner: await buildUser(app, supplier, ['supplier-quality'], { maySign: true }),
    supplierQuality: await buildUser(app, supplier, ['supplier-quality']),
    otherSupplierQuality: await buildUser(app, otherSupplier, ['supplier-quality'], { maySign: true }),
    otherReviewer: await buildUser(app, otherCustomer, ['quality-reviewer'], { maySign: true }),
  };
}

/** A deed of this person outside HTTP, for setting a scene through the services. */
export async function deedOf(app: TestApp, user: { id: string }): Promise<Deed> {
  const row = await app.db.reader
    .getRepository(User)
    .findOneOrFail({ where: { id: user.id }, relations: { organisation: true } });
  const actor: Actor = {
    userId: row.id,
    organisationId: row.organisationId,
    organisationName: row.organisation.name,
    name: row.name,
    email: row.email,
    title: row.title,
    roles: row.roles,
    maySign: row.maySign,
    permissions: new Set(permissionsOf(row.roles, row.maySign)),
    sessionId: randomUUID(),
  };
  return {
    actor,
    now: app.clock.now(),
    requestId: randomUUID(),
    publicUrl: app.url,
    transact: app.db.writeTransaction,
    reader: app.db.reader,
    confirmPassword: (password, pointer) => app.core.confirmPassword(actor, password, pointer),
  };
}
