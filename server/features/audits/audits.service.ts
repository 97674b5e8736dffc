import type { AuditFault, AuditOutcome } from '#shared/contracts/audits.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { auditFaultMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import { membersOf } from '../users/users.store.ts';
import type { Audit } from './audit.entity.ts';
import { registryFault } from './audit-registry.ts';
import { auditStudy, type StudyAudit } from './audit-study.ts';
import * as store from './audits.store.ts';

const dayMs = 24 * 60 * 60 * 1000;
const keepMs = 90 * dayMs;

/** What makes the database refuse to change a record; without one of them it would not. */
export const recordTriggers = [
  'record_entries',
  'head_signatures',
  'timestamp_tokens',
  'answers',
  'signing_keys',
  'registry_leaves',
  'registry_heads',
  'protocol_versions',
  'publications',
]
  .flatMap((table) => [`${table}_no_update`, `${table}_no_delete`])
  .sort();

export type OrganisationAudit = Omit<AuditOutcome, 'at'> & { readonly organisationId: string };

type AuditDeps = Pick<Deps, 'db'>;

function databaseFaults({ db }: AuditDeps): Promise<AuditFault[]> {
  return withTransaction(db, async (tx) => {
    const inPlace = new Set(await store.triggersInPlace(tx));
    const gone = recordTriggers.filter((name) => !inPlace.has(name));
    const why = `the database no longer refuses to change records; what refuses it is gone: ${gone.join(', ')}`;
    return gone.length === 0 ? [] : [{ studyId: null, title: 'The database', sequence: null, why }];
  });
}

/** A study as it stood at one instant: a session may be writing to it. A record that breaks its reader is a fault too. */
async function safely({ db }: AuditDeps, studyId: string): Promise<StudyAudit> {
  try {
    return await db.transaction('REPEATABLE READ', (tx) => auditStudy(tx, studyId));
  } catch (error) {
    const why = `it cannot be read: ${error instanceof Error ? error.message : String(error)}`;
    return { title: studyId, entries: 0, signatures: 0, tokens: 0, fault: { sequence: null, why } };
  }
}

async function auditOrganisation(
  deps: AuditDeps,
  organisationId: string,
  shared: readonly AuditFault[],
): Promise<OrganisationAudit> {
  const ids = await withTransaction(deps.db, (tx) => store.recordedStudies(tx, organisationId));
  const sum = { studies: ids.length, entries: 0, signatures: 0, tokens: 0 };
  const faults = [...shared];
  for (const studyId of ids) {
    const { title, entries, signatures, tokens, fault } = await safely(deps, studyId);
    sum.entries += entries;
    sum.signatures += signatures;
    sum.tokens += tokens;
    if (fault !== null) faults.push({ studyId, title, ...fault });
  }
  const broken = faults.flatMap(({ studyId }) => studyId ?? []);
  const why = await deps.db.transaction('REPEATABLE READ', (tx) => registryFault(tx, organisationId, broken));
  if (why !== null) faults.push({ studyId: null, title: 'The registry', sequence: null, why });
  return { organisationId, ...sum, faults };
}

/** Verifies every record of the database, organisation by organisation. */
export async function* auditAll(deps: AuditDeps): AsyncGenerator<OrganisationAudit> {
  const shared = await databaseFaults(deps);
  const ids = await withTransaction(deps.db, (tx) => store.organisationIds(tx));
  for (const organisationId of ids) yield auditOrganisation(deps, organisationId, shared);
}

const newFaults = (faults: readonly AuditFault[], before: readonly AuditFault[]) =>
  faults.filter(
    ({ studyId, sequence, why }) =>
      !before.some((known) => known.studyId === studyId && known.sequence === sequence && known.why === why),
  );

/** Once for each finding: an audit that fails must not wait until somebody looks. */
async function tellOwners(tx: Tx, deps: Deps, organisationId: string, faults: readonly AuditFault[]): Promise<void> {
  if (faults.length === 0) return;
  const mail = auditFaultMail(faults, pageAddresses.proof(deps.config, organisationId));
  for (const { role, user } of await membersOf(tx, organisationId))
    if (role === 'owner') await postMail(tx, deps, { organisationId, recipient: user.email }, mail);
}

/** Audits all records where the last audit is a day old, and keeps what it came to for the owners. */
export async function auditWhenDue(deps: Deps): Promise<void> {
  const { db, clock, log } = deps;
  const last = await withTransaction(db, (tx) => store.lastAuditAt(tx));
  if (last !== null && clock.now() - last.getTime() < dayMs) return;
  const at = new Date(clock.now());
  for await (const audit of auditAll(deps)) {
    const { organisationId, faults, ...sums } = audit;
    for (const { studyId, sequence, why } of faults)
      log.error({ organisation: organisationId, study: studyId, sequence, why }, 'a record does not hold');
    log.info({ organisation: organisationId, ...sums, faults: faults.length }, 'records audited');
    await withTransaction(db, async (tx) => {
      const before = await store.latestAudit(tx, organisationId);
      await store.insertAudit(tx, { ...audit, faults: [...faults], at });
      await tellOwners(tx, deps, organisationId, newFaults(faults, before?.faults ?? []));
    });
  }
  await withTransaction(db, (tx) => store.deleteAuditsBefore(tx, new Date(at.getTime() - keepMs)));
}

const view = ({ at, studies, entries, signatures, tokens, faults }: Audit): AuditOutcome => ({
  at: at.toISOString(),
  studies,
  entries,
  signatures,
  tokens,
  faults,
});

export function latestAudit({ db }: Deps, organisationId: string): Promise<{ latest: AuditOutcome | null }> {
  return withTransaction(db, async (tx) => {
    const latest = await store.latestAudit(tx, organisationId);
    return { latest: latest === null ? null : view(latest) };
  });
}
