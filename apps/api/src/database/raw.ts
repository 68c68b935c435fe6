import type { Database as Connection, Statement } from 'better-sqlite3';
import type { DataSource, EntityManager } from 'typeorm';

const statements = new WeakMap<Connection, Map<string, Statement>>();

function connectionOf(source: DataSource): Connection {
  return (source.driver as unknown as { databaseConnection: Connection }).databaseConnection;
}

function prepared(connection: Connection, sql: string): Statement {
  let known = statements.get(connection);
  if (!known) statements.set(connection, (known = new Map()));
  let statement = known.get(sql);
  if (!statement) known.set(sql, (statement = connection.prepare(sql)));
  return statement;
}

/** A prepared statement on the read-only connection, for lists and look-ups too frequent for the mapper. */
export function readStatement(reader: DataSource, sql: string): Statement {
  return prepared(connectionOf(reader), sql);
}

/**
 * A prepared statement inside the open write transaction of this manager: some fifty times faster than saving entities
 * one by one. It runs at once; what it writes is committed or rolled back with everything else in the unit.
 */
export function writeStatement(manager: EntityManager, sql: string): Statement {
  const runner = manager.queryRunner;
  if (!runner?.isTransactionActive)
    throw new Error('writeStatement needs the manager of an open write transaction.');
  return prepared(connectionOf(manager.dataSource), sql);
}

/** The connection itself, for pragmas, backup and checks at start. */
export function rawConnection(source: DataSource): Connection {
  return connectionOf(source);
}
