import { AsyncLocalStorage } from 'node:async_hooks';
import type { DataSource, EntityManager, QueryRunner } from 'typeorm';

interface Unit {
  open: boolean;
}

const current = new AsyncLocalStorage<Unit>();

/** Called with the milliseconds a transaction held the writer, so that a slow one is seen. */
export type OnHold = (milliseconds: number) => void;

/**
 * The one way to write. SQLite has one connection: two overlapping transactions on it would join each other, and a
 * success already reported would vanish with the other's failure. So units run one after the other, first come first
 * served, each with its own manager, which refuses to work once its unit has ended.
 */
export function createWriteTransaction(writer: DataSource, onHold: OnHold = () => undefined) {
  let tail: Promise<unknown> = Promise.resolve();

  return function writeTransaction<T>(work: (manager: EntityManager) => Promise<T>): Promise<T> {
    if (current.getStore()?.open) {
      return Promise.reject(
        new Error(
          'writeTransaction was entered inside a write transaction, which would wait for itself. Pass the manager on.',
        ),
      );
    }
    const result = tail.then(() => runUnit(writer, work, onHold));
    tail = result.catch(() => undefined);
    return result;
  };
}

async function runUnit<T>(
  writer: DataSource,
  work: (manager: EntityManager) => Promise<T>,
  onHold: OnHold,
): Promise<T> {
  const unit: Unit = { open: true };
  const runner = writer.createQueryRunner();
  const began = performance.now();
  await runner.startTransaction();
  try {
    const result = await current.run(unit, () => work(guardedManager(writer, runner, unit)));
    unit.open = false;
    await runner.commitTransaction();
    return result;
  } catch (error) {
    unit.open = false;
    // A failed COMMIT or a full disk may already have rolled back.
    if (runner.isTransactionActive) await runner.rollbackTransaction().catch(() => undefined);
    throw error;
  } finally {
    await runner.release();
    onHold(performance.now() - began);
  }
}

/** A forgotten await would otherwise write into whoever's transaction comes next. */
function guardedManager(writer: DataSource, runner: QueryRunner, unit: Unit): EntityManager {
  const assertOpen = () => {
    if (!unit.open)
      throw new Error('Work went on after its write transaction had ended: an await is missing.');
  };
  const guarded: QueryRunner = new Proxy(runner, {
    get(target, property) {
      if (property === 'manager') return manager;
      const value: unknown = Reflect.get(target, property, target);
      if (typeof value !== 'function') return value;
      return (...args: unknown[]): unknown => {
        if (property === 'query' || property === 'connect') assertOpen();
        return (value as (...a: unknown[]) => unknown).apply(target, args);
      };
    },
  });
  const manager = writer.createEntityManager(guarded);
  return manager;
}
