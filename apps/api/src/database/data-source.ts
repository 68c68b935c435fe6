import 'reflect-metadata';
import type { Database as Connection } from 'better-sqlite3';
import { DataSource, type EntityManager } from 'typeorm';
import { entities } from './entities/index.ts';
import { migrations } from './migrations/index.ts';
import { SnakeNaming } from './naming-strategy.ts';
import { assertSound, assertSqliteVersion, prepareReader, prepareWriter, wrongPragmas } from './pragmas.ts';
import { rawConnection } from './raw.ts';
import { createWriteTransaction, type OnHold } from './write-transaction.ts';

export interface Database {
  /** Every write of the product. */
  readonly writeTransaction: <T>(work: (manager: EntityManager) => Promise<T>) => Promise<T>;
  /** Read-only connection for screens: sees committed rows only and cannot write. */
  readonly reader: DataSource;
  /** What of the durability settings is not in force; empty when all is well. */
  readonly faults: () => string[];
  /** Copies the database into another file while it is in use. */
  readonly backup: (file: string) => Promise<void>;
  readonly close: () => Promise<void>;
}

const common = {
  type: 'better-sqlite3',
  entities,
  migrations,
  namingStrategy: new SnakeNaming(),
  synchronize: false,
} as const;

/** Also used by the migration tool and the drift test; everything else goes through `openDatabase`. */
export function createWriter(file: string): DataSource {
  return new DataSource({
    ...common,
    database: file,
    enableWAL: true,
    timeout: 5000,
    prepareDatabase: (connection: Connection) => prepareWriter(connection),
    migrationsTransactionMode: 'each',
  });
}

function createReader(file: string): DataSource {
  return new DataSource({
    ...common,
    database: file,
    readonly: true,
    fileMustExist: true,
    timeout: 5000,
    prepareDatabase: (connection: Connection) => prepareReader(connection),
  });
}

/** Opens, migrates and checks the database; throws `DatabaseUnfit` rather than serve from a file that is not sound. */
export async function openDatabase(
  file: string,
  options: { onHold?: OnHold; migrate?: boolean } = {},
): Promise<Database> {
  const writer = await createWriter(file).initialize();
  try {
    const connection = rawConnection(writer);
    assertSqliteVersion(connection);
    if (options.migrate ?? true) await writer.runMigrations({ transaction: 'each' });
    assertSound(connection);
    const reader = await createReader(file).initialize();
    return {
      writeTransaction: createWriteTransaction(writer, options.onHold),
      reader,
      faults: () => wrongPragmas(connection),
      backup: async (target) => {
        await connection.backup(target);
      },
      close: async () => {
        await reader.destroy();
        connection.pragma('wal_checkpoint(TRUNCATE)');
        await writer.destroy();
      },
    };
  } catch (error) {
    await writer.destroy();
    throw error;
  }
}
