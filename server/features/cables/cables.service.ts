import type { CableDraft, CableListQuery, Cable as CableReply, SpecimenDraft } from '#shared/contracts/cables.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { Caller } from '../../http/access.ts';
import type { Cable } from './cable.entity.ts';
import * as store from './cables.store.ts';
import { cableRowView, cableView } from './cables.views.ts';
import { cablesClosedTo, openCable } from './open-cable.service.ts';

function requireFreeSerial(cable: Cable, serial: string, own?: string): void {
  const taken = cable.specimens.some(
    (other) => other.id !== own && other.serial.toLowerCase() === serial.toLowerCase(),
  );
  if (taken)
    throw new Problem('invalid-input', 'Two specimens of a cable need different marks.', [
      { pointer: '/serial', detail: 'Another specimen of this cable bears this mark' },
    ]);
}

export function listCables({ db }: Deps, who: Caller, query: CableListQuery) {
  return withTransaction(db, async (tx) => {
    const without = [...(await cablesClosedTo(tx, who))];
    const found = await store.listCables(tx, who.organisationId, { ...query, without });
    return { ...found, rows: found.rows.map(cableRowView) };
  });
}

/** Cables with at least one specimen in use: what a study can choose from. */
export function cableChoices({ db }: Deps, who: Caller) {
  return withTransaction(db, async (tx) => {
    const closed = await cablesClosedTo(tx, who);
    const cables = (await store.cablesInUse(tx, who.organisationId)).filter(({ id }) => !closed.has(id));
    const usable = cables.map((cable) => ({
      ...cableView(cable),
      specimens: cableView(cable).specimens.filter((s) => !s.archived),
    }));
    return { cables: usable };
  });
}

export function getCable({ db }: Deps, who: Caller, id: string): Promise<CableReply> {
  return withTransaction(db, async (tx) => cableView(await openCable(tx, who, id)));
}

export function createCable({ db, clock, random }: Deps, who: Caller, draft: CableDraft): Promise<CableReply> {
  return withTransaction(db, async (tx) => {
    const id = random.id();
    await store.insertCable(tx, { id, organisationId: who.organisationId, draft, now: new Date(clock.now()) });
    return cableView(await openCable(tx, who, id));
  });
}

/** One change of a cable or its specimens, and the cable as it then is. */
function change(deps: Deps, who: Caller, id: string, action: (tx: Tx, cable: Cable, now: Date) => Promise<void>) {
  return withTransaction(deps.db, async (tx) => {
    const now = new Date(deps.clock.now());
    await action(tx, await openCable(tx, who, id), now);
    await store.updateCable(tx, id, {}, now);
    return cableView(await openCable(tx, who, id));
  });
}

export function updateCable(deps: Deps, who: Caller, id: string, draft: CableDraft) {
  return change(deps, who, id, (tx, _cable, now) => store.updateCable(tx, id, draft, now));
}

export function archiveCable(deps: Deps, who: Caller, id: string, archived: boolean) {
  return change(deps, who, id, (tx, _cable, now) => store.updateCable(tx, id, { archived }, now));
}

export function addSpecimen(deps: Deps, who: Caller, id: string, draft: SpecimenDraft) {
  return change(deps, who, id, async (tx, cable) => {
    requireFreeSerial(cable, draft.serial);
    const specimen = { id: deps.random.id(), cableId: id, draft, position: cable.specimens.length + 1 };
    await store.insertSpecimen(tx, specimen);
  });
}

function requireSpecimen(cable: Cable, specimenId: string): void {
  const exists = cable.specimens.some((specimen) => specimen.id === specimenId);
  if (!exists) throw new Problem('not-found', 'There is no such specimen.');
}

export function updateSpecimen(
  deps: Deps,
  who: Caller,
  { id, specimenId }: { id: string; specimenId: string },
  draft: SpecimenDraft,
) {
  return change(deps, who, id, async (tx, cable) => {
    requireSpecimen(cable, specimenId);
    requireFreeSerial(cable, draft.serial, specimenId);
    await store.updateSpecimen(tx, specimenId, draft);
  });
}

export function archiveSpecimen(
  deps: Deps,
  who: Caller,
  { id, specimenId }: { id: string; specimenId: string },
  archived: boolean,
) {
  return change(deps, who, id, async (tx, cable) => {
    requireSpecimen(cable, specimenId);
    await store.updateSpecimen(tx, specimenId, { archived });
  });
}
