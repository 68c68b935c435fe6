import type { Request } from 'express';
import type { Clock } from '../clock.ts';
import type { Actor } from './actor.ts';
import { TooMany } from './problems.ts';

export interface RateLimitSettings {
  /** Requests a minute. */
  readonly perAddress: number;
  readonly perPerson: number;
  readonly perOrganisation: number;
  /** Off in most tests, which call far more often than a person. */
  readonly enabled: boolean;
}

export const ordinaryLimits: RateLimitSettings = {
  perAddress: 3000,
  perPerson: 1200,
  perOrganisation: 6000,
  enabled: true,
};

/** Counters by address, person and organisation, so that one organisation cannot take the service from another. */
export class RateLimits {
  private readonly address: Counter;
  private readonly person: Counter;
  private readonly organisation: Counter;
  private readonly ofRoute = new Map<string, Counter>();

  constructor(
    private readonly settings: RateLimitSettings,
    private readonly clock: Clock,
  ) {
    this.address = new Counter(settings.perAddress, 60);
    this.person = new Counter(settings.perPerson, 60);
    this.organisation = new Counter(settings.perOrganisation, 60);
  }

  beforeSignIn(req: Request): void {
    if (this.settings.enabled) this.address.take(addressOf(req), this.clock.millis());
  }

  afterSignIn(actor: Actor): void {
    if (!this.settings.enabled) return;
    const now = this.clock.millis();
    this.person.take(actor.userId, now);
    this.organisation.take(actor.organisationId, now);
  }

  /** A stricter limit of one route, by person or, before sign-in, by address. */
  ofOne(name: string, limit: { max: number; seconds: number }, req: Request, actor: Actor | null): void {
    if (!this.settings.enabled) return;
    let counter = this.ofRoute.get(name);
    if (!counter) this.ofRoute.set(name, (counter = new Counter(limit.max, limit.seconds)));
    counter.take(actor?.userId ?? addressOf(req), this.clock.millis());
  }
}

const mostKeys = 50_000;

class Counter {
  private readonly windows = new Map<string, { count: number; endsAt: number }>();

  constructor(
    private readonly max: number,
    private readonly seconds: number,
  ) {}

  take(key: string, now: number): void {
    const window = this.windows.get(key);
    if (window === undefined || window.endsAt <= now) {
      if (this.windows.size >= mostKeys) this.sweep(now);
      this.windows.set(key, { count: 1, endsAt: now + this.seconds * 1000 });
      return;
    }
    window.count += 1;
    if (window.count > this.max) throw new TooMany(Math.ceil((window.endsAt - now) / 1000));
  }

  private sweep(now: number): void {
    for (const [key, window] of this.windows) if (window.endsAt <= now) this.windows.delete(key);
    // All of them living means a flood of addresses: the oldest give way, so that memory stays bounded.
    for (const key of this.windows.keys()) {
      if (this.windows.size < mostKeys) break;
      this.windows.delete(key);
    }
  }
}

/** An IPv6 caller owns a whole /64: counting single addresses would count nothing. */
function addressOf(req: Request): string {
  const address = req.ip ?? '';
  return address.includes(':') && !address.includes('.') ? address.split(':').slice(0, 4).join(':') : address;
}
