import type { CableDraft, CableListQuery, Cable as CableReply, SpecimenDraft } from '#shared/contracts/cables.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { Cable } from './cable.entity.ts';
import * as store from './cables.store.ts';
import { cableRowView, cableView } from './cables.views.ts';

async function cableOrProblem(tx: Tx, organisationId: string, id: string): Promise<Cable> {
  const cable = await store.findCable(tx, organisationId, id);
  if (cable === null) throw new Problem('not-found', 'There is no such cable.');
  return cable;
}

function requireFreeSerial(cable: Cable, serial: string, own?: string): void {
  const taken = cable.specimens.some(
    (other) => other.id !== own && other.serial.toLowerCase() === serial.toLowerCase(),
  );
  if (taken)
    throw new Problem('invalid-input', 'Two specimens of a cable need different marks.', [
      { pointer: '/serial', detail: 'Another specimen of this cable bears this mark' },
    ]);
}

export function listCables({ db }: Deps, organisationId: string, query: CableListQuery) {
  return withTransaction(db, async (tx) => {
    const found = await store.listCables(tx, organisationId, query);
    return { ...found, rows: found.rows.map(cableRowView) };
  });
}

/** Cables with at least one specimen in use: what a study can choose from. */
export function cableChoices({ db }: Deps, organisationId: string) {
  return withTransaction(db, async (tx) => {
    const cables = await store.cablesInUse(tx, organisationId);
    const usable = cables.map((cable) => ({
      ...cableView(cable),
      specimens: cableView(cable).specimens.filter((s) => !s.archived),
    }));
    return { cables: usable };
  });
}

export function getCable({ db }: Deps, organisationId: string, id: string): Promise<CableReply> {
  return withTransaction(db, async (tx) => cableView(await cableOrProblem(tx, organisationId, id)));
}

export function createCable(
  { db, clock, random }: Deps,
  organisationId: string,
  draft: CableDraft,
): Promise<CableReply> {
  return withTransaction(db, async (tx) => {
    const id = random.id();
    await store.insertCable(tx, { id, organisationId, draft, now: new Date(clock.now()) });
    return cableView(await cableOrProblem(tx, organisationId, id));
  });
}

/** One change of a cable or its specimens, and the cable as it then is. */
function change(
  deps: Deps,
  organisationId: string,
  id: string,
  action: (tx: Tx, cable: Cable, now: Date) => Promise<void>,
) {
  return withTransaction(deps.db, async (tx) => {
    const now = new Date(deps.clock.now());
    await action(tx, await cableOrProblem(tx, organisationId, id), now);
    await store.updateCable(tx, id, {}, now);
    return cableView(await cableOrProblem(tx, organisationId, id));
  });
}

export function updateCable(deps: Deps, organisationId: string, id: string, draft: CableDraft) {
  return change(deps, organisationId, id, (tx, _cable, now) => store.updateCable(tx, id, draft, now));
}

export function archiveCable(deps: Deps, organisationId: string, id: string, archived: boolean) {
  return change(deps, organisationId, id, (tx, _cable, now) => store.updateCable(tx, id, { archived }, now));
}

export function addSpecimen(deps: Deps, organisationId: string, id: string, draft: SpecimenDraft) {
  return change(deps, organisationId, id, async (tx, cable) => {
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
  organisationId: string,
  { id, specimenId }: { id: string; specimenId: string },
  draft: SpecimenDraft,
) {
  return change(deps, organisationId, id, async (tx, cable) => {
    requireSpecimen(cable, specimenId);
    requireFreeSerial(cable, draft.serial, specimenId);
    await store.updateSpecimen(tx, specimenId, draft);
  });
}

export function archiveSpecimen(
  deps: Deps,
  organisationId: string,
  { id, specimenId }: { id: string; specimenId: string },
  archived: boolean,
) {
  return change(deps, organisationId, id, async (tx, cable) => {
    requireSpecimen(cable, specimenId);
    await store.updateSpecimen(tx, specimenId, { archived });
  });
}
