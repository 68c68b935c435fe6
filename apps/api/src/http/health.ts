import { statfs } from 'node:fs/promises';
import { Router } from 'express';
import type { DataSource } from 'typeorm';

const leastFreeBytes = 200 * 1024 * 1024;

export interface HealthChecks {
  readonly reader: DataSource;
  readonly dataDir: string;
  /** Durability settings of the writer that are not in force. */
  readonly faults: () => string[];
  readonly storeIsReachable: () => Promise<boolean>;
  /** True from the moment the process was asked to stop. */
  readonly isStopping: () => boolean;
}

/** `live` says the process answers; `ready` says it can do its work. Neither names a version, a path or a reason. */
export function healthRoutes(checks: HealthChecks): Router {
  const router = Router();
  router.get('/health/live', (_req, res) => {
    res.setHeader('Cache-Control', 'no-store');
    res.json({ live: true });
  });
  router.get('/health/ready', async (_req, res) => {
    const parts = {
      serving: !checks.isStopping(),
      database: databaseAnswers(checks),
      disk: await diskHasRoom(checks.dataDir),
      store: await checks.storeIsReachable(),
    };
    // Without the store only files are out of reach: reviews go on.
    const ready = parts.serving && parts.database && parts.disk;
    res.setHeader('Cache-Control', 'no-store');
    res.status(ready ? 200 : 503).json({ ready, degraded: ready && !parts.store, ...parts });
  });
  return router;
}

function databaseAnswers(checks: HealthChecks): boolean {
  try {
    return checks.reader.isInitialized && checks.faults().length === 0;
  } catch {
    return false;
  }
}

async function diskHasRoom(folder: string): Promise<boolean> {
  try {
    const disk = await statfs(folder);
    return disk.bavail * disk.bsize > leastFreeBytes;
  } catch {
    return false;
  }
}
