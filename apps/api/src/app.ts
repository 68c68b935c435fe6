import { join } from 'node:path';
import express, { type Express } from 'express';
import type { Logger } from 'pino';
import type { Job } from './background.ts';
import type { Clock } from './clock.ts';
import type { Config } from './config.ts';
import { AuditAnchors } from './database/audit-anchors.ts';
import type { Database } from './database/data-source.ts';
import { IdempotencyKeys } from './database/idempotency.ts';
import { passwordsRoutes } from './features/accounts/passwords.routes.ts';
import { peopleRoutes } from './features/accounts/people.routes.ts';
import { demoPeopleRoutes } from './features/accounts/demo-people.routes.ts';
import { sessionsRoutes } from './features/accounts/sessions.routes.ts';
import { createActorFinder } from './features/accounts/session-touch.ts';
import { confirmPassword } from './features/accounts/sign-in.service.ts';
import { apiDescriptionRoutes } from './features/api-description/api-description.routes.ts';
import { auditRoutes } from './features/audit/audit.routes.ts';
import { buyingStatusRoutes } from './features/buying-status/buying-status.routes.ts';
import { runInterimClock } from './features/buying-status/interim-clock.ts';
import { checksRoutes } from './features/checks/checks.routes.ts';
import { deviationsRoutes } from './features/deviations/deviations.routes.ts';
import { dispositionsRoutes } from './features/dispositions/dispositions.routes.ts';
import { measurementsRoutes } from './features/measurements/measurements.routes.ts';
import { submissionReviewRoutes } from './features/submission-review/submission-review.routes.ts';
import { warrantsRoutes } from './features/warrants/warrants.routes.ts';
import { characteristicsRoutes } from './features/characteristics/characteristics.routes.ts';
import { sweepTableImports } from './features/table-imports/hold-file.ts';
import { tableExportsRoutes } from './features/table-imports/table-exports.routes.ts';
import { tableImportsRoutes } from './features/table-imports/table-imports.routes.ts';
import { partsRoutes } from './features/parts/parts.routes.ts';
import { documentsRoutes } from './features/documents/documents.routes.ts';
import { organisationsRoutes } from './features/organisations/organisations.routes.ts';
import { noteAuditHead, verifyAtStart } from './features/audit/audit-anchor.job.ts';
import { sweepPendingFiles } from './features/documents/documents.service.ts';
import { gaugesRoutes } from './features/gauges/gauges.routes.ts';
import { sendReminders } from './features/notifications/reminders.ts';
import { reportsRoutes } from './features/reports/reports.routes.ts';
import { requestsRoutes } from './features/requests/requests.routes.ts';
import { evidenceRoutes } from './features/submissions/evidence.routes.ts';
import { submissionsRoutes } from './features/submissions/submissions.routes.ts';
import { ApiRouter } from './http/api-router.ts';
import { createAuthentication } from './http/authenticate.ts';
import { noSuchRoute } from './http/unknown-route.ts';
import type { Core } from './http/core.ts';
import { contentPolicyReports } from './http/content-policy-reports.ts';
import { createErrorHandler } from './http/error-handler.ts';
import { healthRoutes } from './http/health.ts';
import { PasswordHashing } from './http/password-hashing.ts';
import { portalFiles } from './http/portal-files.ts';
import { NotFound } from './http/problems.ts';
import { RateLimits, type RateLimitSettings } from './http/rate-limits.ts';
import { requestLog } from './http/request-log.ts';
import { securityHeaders } from './http/security-headers.ts';
import { sendDueMails } from './mail/relay.ts';
import type { MailTransport } from './mail/transport.ts';
import type { FileStore } from './storage/file-store.ts';

export interface Dependencies {
  readonly config: Config;
  readonly clock: Clock;
  readonly log: Logger;
  readonly db: Database;
  readonly store: FileStore;
  readonly transport: MailTransport;
  readonly rateLimits: RateLimitSettings;
  readonly checkEveryAnswer: boolean;
}

export interface App {
  readonly express: Express;
  readonly router: ApiRouter;
  readonly core: Core;
  readonly jobs: readonly Job[];
  /** Checks and preparations before the first request. */
  readonly prepare: () => Promise<void>;
  /** From now on readiness is red. */
  readonly stopping: () => void;
  /** Last acts before the database closes. */
  readonly finish: () => Promise<void>;
}

export function createApp(dependencies: Dependencies): App {
  const { config, clock, log, db, store, transport } = dependencies;
  const hashing = new PasswordHashing();
  const core: Core = {
    config,
    clock,
    log,
    db,
    hashing,
    keys: new IdempotencyKeys(db.reader),
    limits: new RateLimits(dependencies.rateLimits, clock),
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
  let isStopping = false;
  app.use(
    healthRoutes({
      reader: db.reader,
      dataDir: config.dataDir,
      faults: db.faults,
      storeIsReachable: () => store.isReachable(),
      isStopping: () => isStopping,
    }),
  );
  app.use(contentPolicyReports(log));

  const anchors = new AuditAnchors(join(config.dataDir, 'audit-anchors.log'), config.secrets.audit);
  const router = new ApiRouter(core);
  demoPeopleRoutes(router);
  apiDescriptionRoutes(router);
  sessionsRoutes(router);
  passwordsRoutes(router);
  peopleRoutes(router);
  organisationsRoutes(router);
  partsRoutes(router);
  characteristicsRoutes(router);
  tableExportsRoutes(router);
  tableImportsRoutes(router);
  requestsRoutes(router);
  submissionsRoutes(router);
  evidenceRoutes(router);
  gaugesRoutes(router);
  measurementsRoutes(router);
  checksRoutes(router);
  deviationsRoutes(router);
  warrantsRoutes(router);
  submissionReviewRoutes(router);
  dispositionsRoutes(router);
  buyingStatusRoutes(router);
  reportsRoutes(router);
  auditRoutes(router, anchors);
  documentsRoutes(router, store);

  app.use('/api', router.handle, noSuchRoute(router));
  app.use(portalFiles(config.portalDir));
  app.use((_req, _res, next) => next(new NotFound('There is no such address.')));
  app.use(createErrorHandler(log));

  const jobs: Job[] = [
    { name: 'mail', everySeconds: 2, work: () => sendDueMails({ db, clock, log, transport }) },
    { name: 'audit anchor', everySeconds: 3600, work: () => noteAuditHead(core, anchors) },
    { name: 'unfinished uploads', everySeconds: 3600, work: () => sweepPendingFiles(db, clock, store) },
    {
      name: 'reminders',
      everySeconds: 600,
      work: async () => void (await sendReminders({ db, clock, publicUrl: config.publicUrl })),
    },
    {
      name: 'interim approvals',
      everySeconds: 600,
      work: async () => void (await runInterimClock({ db, clock, publicUrl: config.publicUrl })),
    },
    { name: 'unconfirmed imports', everySeconds: 3600, work: () => sweepTableImports(db, clock) },
    { name: 'old keys', everySeconds: 3600, work: () => sweepKeys(core) },
  ];
  return {
    express: app,
    router,
    core,
    jobs,
    prepare: () => verifyAtStart(core, anchors),
    stopping: () => {
      isStopping = true;
    },
    finish: () => noteAuditHead(core, anchors),
  };
}

async function sweepKeys({ db, keys, clock }: Core): Promise<void> {
  await db.writeTransaction((manager) => Promise.resolve(keys.sweep(manager, clock.now())));
}
