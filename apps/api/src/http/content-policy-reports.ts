import express, { Router } from 'express';
import type { Logger } from 'pino';

/** Browsers tell here what the content policy stopped; only the directive and the blocked kind are noted. */
export function contentPolicyReports(log: Logger): Router {
  const router = Router();
  const reader = express.json({
    limit: 8192,
    type: ['application/csp-report', 'application/reports+json', 'application/json'],
  });
  router.post('/content-policy-reports', reader, (req, res) => {
    const report = (req.body as { 'csp-report'?: Record<string, unknown> } | undefined)?.['csp-report'];
    log.warn(
      {
        directive: String(report?.['violated-directive'] ?? '').slice(0, 100),
        blocked: String(report?.['blocked-uri'] ?? '').slice(0, 100),
      },
      'content policy stopped something',
    );
    res.status(204).end();
  });
  return router;
}
