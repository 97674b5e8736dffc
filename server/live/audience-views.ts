import { type ListenerView, type LockReceipt, listenerView } from '#shared/contracts/listener-live.ts';
import { type ObserverView, observerView } from '#shared/contracts/observer-live.ts';
import { type ProctorView, proctorView } from '#shared/contracts/proctor-live.ts';
import { isInventoryDue } from '#shared/session/decide-scan.ts';
import { observerViewOf } from '#shared/session/observer-view.ts';
import { optionsOf } from '#shared/session/progress.ts';
import { listenerViewOf, type Presence, proctorViewOf } from '#shared/session/views.ts';
import type { Deps } from '../deps.ts';
import { joinOf } from './join.ts';
import type { Keeper } from './keeper.ts';
import type { SessionMemory } from './session-memory.ts';
import type { Watching } from './watchers.ts';

/** What a practice trial with feedback tells one listener. */
function toldTo({ told, method, state }: SessionMemory, seat: string): ListenerView['told'] {
  const { isRight } = method.trials;
  if (told === null || isRight === null) return null;
  const right = optionsOf(state, method).find(({ value }) => isRight(value, told.truth));
  if (right === undefined) throw new Error(`nothing is right in practice ${told.practice}`);
  const choice = told.choices.get(seat);
  const said = choice === undefined ? null : isRight(choice, told.truth);
  return { practice: told.practice, right: right.sentence, isRight: said };
}

/** What one seat's phone shows now. */
export function phoneViewOf(memory: SessionMemory, seat: string, now: number): ListenerView {
  const { lock } = memory;
  const leaf = lock?.leaves.get(seat);
  const lastLock: LockReceipt | null =
    lock === null || leaf === undefined
      ? null
      : { trial: lock.trial, leaf, sequence: lock.sequence, digest: lock.digest };
  const context = {
    title: memory.title,
    rehearsal: memory.isRehearsal,
    seat,
    now,
    held: memory.held.get(seat) ?? null,
    lastLock,
    told: toldTo(memory, seat),
  };
  return listenerView.parse(listenerViewOf(memory.state, memory.method, context));
}

/** What the console shows now. */
export async function consoleViewOf(
  { config, clock }: Deps,
  memory: SessionMemory,
  keeper: Keeper,
  awaySince: (seat: string) => number | null,
): Promise<ProctorView> {
  const { state, session, method } = memory;
  const presence: Presence[] = [...memory.seats].map(([seat, { place }]) => ({
    seat,
    place,
    awaySince: awaySince(seat),
  }));
  const isOpen = state.phase === 'seating' || state.phase === 'revealing' || state.phase === 'running';
  return proctorView.parse(
    proctorViewOf(state, method, {
      title: memory.title,
      room: session.room,
      now: clock.now(),
      code: await keeper.codeToFit(memory),
      codesInAll: isInventoryDue(state) ? (await keeper.codes(memory)).length : null,
      join: isOpen && session.code !== null ? await joinOf(config.publicUrl, session.code) : null,
      presence,
      entries: memory.entries,
      demo: config.demo,
      rehearsal: memory.isRehearsal,
    }),
  );
}

/** What an observer sees now. */
export function observerPageOf(
  { state, method, title }: SessionMemory,
  { label, name }: Watching,
  now: number,
): ObserverView {
  return observerView.parse(observerViewOf(state, method, { title, observer: label, name, now }));
}
