import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { permissionsOf, type Role } from '@trammel/shared/roles';
import { demoPassword } from '../config.ts';
import { Organisation } from '../database/entities/organisation.entity.ts';
import { OrganisationLink } from '../database/entities/organisation-link.entity.ts';
import { Site } from '../database/entities/site.entity.ts';
import { User } from '../database/entities/user.entity.ts';
import type { Actor } from '../http/actor.ts';
import type { Core } from '../http/core.ts';
import type { Deed } from '../http/deed.ts';
import { customer, mailOf, suppliers, type DemoOrganisation, type SupplierKey } from './people.ts';

export interface SeededOrganisation {
  readonly id: string;
  readonly siteId: string;
  readonly people: ReadonlyMap<string, Actor>;
}

const day = 86_400_000;

/** Who acts in the demo, and when: every date is counted from the day of seeding. */
export class DemoCast {
  constructor(
    private readonly core: Core,
    readonly customer: SeededOrganisation,
    readonly suppliers: Record<SupplierKey, SeededOrganisation>,
  ) {}

  /** A calendar day so many days from today; negative lies in the past. */
  date(days: number): string {
    return new Date(Date.parse(this.core.clock.now()) + days * day).toISOString().slice(0, 10);
  }

  /** A deed of this person so many days from today, at an hour of the working day. */
  deed(name: string, days: number, hour = 9): Deed {
    const actor = [this.customer, ...Object.values(this.suppliers)]
      .map((place) => place.people.get(name))
      .find((found) => found !== undefined);
    if (!actor) throw new Error(`${name} is not in the demo.`);
    return {
      actor,
      now: this.moment(days, hour),
      requestId: randomUUID(),
      publicUrl: this.core.config.publicUrl,
      transact: this.core.db.writeTransaction,
      reader: this.core.db.reader,
      confirmPassword: () => Promise.resolve(),
    };
  }

  /** Never after now: nothing has happened in the future. */
  private moment(days: number, hour: number): string {
    const today = Math.floor(Date.parse(this.core.clock.now()) / day) * day;
    const wanted = today + days * day + hour * 3_600_000 + Math.abs(days * 7) * 60_000;
    return new Date(Math.min(wanted, Date.parse(this.core.clock.now()))).toISOString();
  }
}

/** Organisations, links and people. All share one password, which the sign-in page of the demo tells. */
export async function seedCast(core: Core): Promise<DemoCast> {
  const passwordHash = await core.hashing.hash(demoPassword);
  const createdAt = new Date(Date.parse(core.clock.now()) - 200 * day).toISOString();
  return core.db.writeTransaction(async (manager) => {
    const add = (organisation: DemoOrganisation) =>
      seedOrganisation(manager, organisation, passwordHash, createdAt);
    const buyer = await add(customer);
    const seeded = {} as Record<SupplierKey, SeededOrganisation>;
    for (const key of Object.keys(suppliers) as SupplierKey[]) {
      const supplier = await add(suppliers[key]);
      seeded[key] = supplier;
      await manager.insert(OrganisationLink, {
        id: randomUUID(),
        customerId: buyer.id,
        supplierId: supplier.id,
        supplierNumber: suppliers[key].supplierNumber,
        createdAt,
      });
    }
    return new DemoCast(core, buyer, seeded);
  });
}

async function seedOrganisation(
  manager: EntityManager,
  { name, site, people }: DemoOrganisation,
  passwordHash: string,
  createdAt: string,
): Promise<SeededOrganisation> {
  const organisation = { id: randomUUID(), name, createdAt };
  await manager.insert(Organisation, organisation);
  const place = { id: randomUUID(), organisationId: organisation.id, name: site, address: '' };
  await manager.insert(Site, place);
  const actors = new Map<string, Actor>();
  for (const person of people) {
    const roles: Role[] = [...person.roles];
    const user = {
      id: randomUUID(),
      organisationId: organisation.id,
      email: mailOf(person.name, name),
      name: person.name,
      title: person.title,
      roles,
      maySign: person.maySign ?? false,
      passwordHash,
      createdAt,
    };
    await manager.insert(User, user);
    actors.set(person.name, {
      userId: user.id,
      organisationId: organisation.id,
      organisationName: name,
      name: person.name,
      email: user.email,
      title: person.title,
      roles,
      maySign: user.maySign,
      permissions: new Set(permissionsOf(roles, user.maySign)),
      sessionId: '',
    });
  }
  return { id: organisation.id, siteId: place.id, people: actors };
}
