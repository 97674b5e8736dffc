import type { Tx } from '../../db/transaction.ts';
import { Observer } from './observer.entity.ts';

export function observersOf(tx: Tx, sessionId: string): Promise<Observer[]> {
  return tx.find(Observer, { where: { sessionId }, order: { label: 'ASC' } });
}

export function findObserver(tx: Tx, id: string): Promise<Observer | null> {
  return tx.findOneBy(Observer, { id });
}

export async function insertObserver(tx: Tx, observer: Observer): Promise<void> {
  await tx.insert(Observer, observer);
}

export async function withdrawObserver(tx: Tx, id: string): Promise<void> {
  await tx.update(Observer, { id }, { withdrawn: true });
}
