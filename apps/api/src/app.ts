import { join } from 'node:path';
import express, { type Express } from 'express';
import type { Logger } from 'pino';
import type { Clock } from './clock.ts';
import type { Config } from './config.ts';
import { AuditAnchors } from './database/audit-anchors.ts';
import type { Database } from './database/data-source.ts';
import { IdempotencyKeys } from './database/idempotency.ts';
import { passwordsRoutes } from './features/accounts/passwords.routes.ts';
import { peopleRoutes } from './features/accounts/people.routes.ts';
import { sessionsRoutes } from './features/accounts/sessions.routes.ts';
import { createActorFinder } from './features/accounts/session-touch.ts';
import { confirmPassword } from './features/accounts/sign-in.service.ts';
import { auditRoutes } from './features/audit/audit.routes.ts';
import { organisationsRoutes } from './features/organisations/organisations.routes.ts';
import { ApiRouter } from './http/api-router.ts';
import { createAuthentication } from './http/authenticate.ts';
import { noSuchRoute } from './http/unknown-route.ts';
import type { Core } from './http/core.ts';
import { createErrorHandler } from './http/error-handler.ts';
import { PasswordHashing } from './http/password-hashing.ts';
import { RateLimits, type RateLimitSettings } from './http/rate-limits.ts';
import { requestLog } from './http/request-log.ts';
import { securityHeaders } from './http/security-headers.ts';
import type { FileStore } from './storage/file-store.ts';

export interface Dependencies {
  readonly config: Config;
  readonly clock: Clock;
  readonly log: Logger;
  readonly db: Database;
  readonly store: FileStore;
  readonly rateLimits: RateLimitSettings;
  readonly checkEveryAnswer: boolean;
}

export interface App {
  readonly express: Express;
  readonly router: ApiRouter;
  readonly core: Core;
}

export function createApp(dependencies: Dependencies): App {
  const { config, clock, log, db } = dependencies;
  const hashing = new PasswordHashing();
  const core: Core = {
    config,
    clock,
    log,
    db,
    hashing,
    keys: new IdempotencyKeys(db.reader),
    limits: new RateLimits(dependencies.rateLimits),
    authentication: createAuthentication({
      secret: config.secrets.session,
      publicUrl: config.publicUrl,
      clock,
      findActor: createActorFinder(db, clock, log),
    }),
    confirmPassword: (actor, password, pointer) =>
      confirmPassword({ db, clock, hashing }, actor, password, pointer),
    checkEveryAnswer: dependencies.checkEveryAnswer,
  };

  const app = express();
  app.disable('x-powered-by');
  app.set('etag', false);
  app.set('trust proxy', config.trustedProxies);
  app.use(requestLog(log));
  app.use(securityHeaders(config.publicUrl.startsWith('https:')));

  const anchors = new AuditAnchors(join(config.dataDir, 'audit-anchors.log'), config.secrets.audit);
  const router = new ApiRouter(core);
  sessionsRoutes(router);
  passwordsRoutes(router);
  peopleRoutes(router);
  organisationsRoutes(router);
  auditRoutes(router, anchors);

  app.use('/api', router.express, noSuchRoute(router));
  app.use(createErrorHandler(log));
  return { express: app, router, core };
}
