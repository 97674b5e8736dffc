import type { DataSource, EntityManager } from 'typeorm';

/** The open transaction. Every store function takes it first, so that none can run outside one by mistake. */
export type Tx = EntityManager;

/** Runs one action in one transaction; a thrown error rolls all of it back. */
export function withTransaction<T>(db: DataSource, action: (tx: Tx) => Promise<T>): Promise<T> {
  return db.transaction('READ COMMITTED', action);
}
