import type { Request, RequestHandler, Response } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { run } from './body.ts';
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

interface Caller {
  readonly userId: string;
  readonly organisationId: string;
}

/** Counters by address, person and organisation, so that one organisation cannot take the service from another. */
export class RateLimits {
  private readonly address: RequestHandler;
  private readonly person: RequestHandler;
  private readonly organisation: RequestHandler;
  private readonly ofRoute = new Map<string, RequestHandler>();

  constructor(private readonly settings: RateLimitSettings) {
    this.address = limiter(settings.perAddress, 60, (req) => addressOf(req));
    this.person = limiter(settings.perPerson, 60, (_req, res) => callerOf(res)?.userId ?? '');
    this.organisation = limiter(
      settings.perOrganisation,
      60,
      (_req, res) => callerOf(res)?.organisationId ?? '',
    );
  }

  async beforeSignIn(req: Request, res: Response): Promise<void> {
    if (this.settings.enabled) await run(this.address, req, res);
  }

  async afterSignIn(req: Request, res: Response): Promise<void> {
    if (!this.settings.enabled || !callerOf(res)) return;
    await run(this.person, req, res);
    await run(this.organisation, req, res);
  }

  async ofOne(
    name: string,
    limit: { max: number; seconds: number },
    req: Request,
    res: Response,
  ): Promise<void> {
    if (!this.settings.enabled) return;
    let known = this.ofRoute.get(name);
    if (!known) {
      known = limiter(
        limit.max,
        limit.seconds,
        (request, response) => callerOf(response)?.userId ?? addressOf(request),
      );
      this.ofRoute.set(name, known);
    }
    await run(known, req, res);
  }
}

function limiter(
  max: number,
  seconds: number,
  keyGenerator: (req: Request, res: Response) => string,
): RequestHandler {
  return rateLimit({
    windowMs: seconds * 1000,
    limit: max,
    keyGenerator,
    standardHeaders: false,
    legacyHeaders: false,
    validate: false,
    handler: (req, _res, next) => {
      const info = (req as Request & { rateLimit?: { resetTime?: Date } }).rateLimit;
      const wait = info?.resetTime ? Math.ceil((info.resetTime.getTime() - Date.now()) / 1000) : seconds;
      next(new TooMany(Math.max(1, wait)));
    },
  });
}

function addressOf(req: Request): string {
  return ipKeyGenerator(req.ip ?? '');
}

function callerOf(res: Response): Caller | undefined {
  return res.locals.actor as Caller | undefined;
}
