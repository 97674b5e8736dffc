import type { RegistryRow, RegistryState } from '#shared/contracts/registry.ts';
import { isClosed } from '#shared/contracts/studies.ts';
import type { RegistryLeafRow } from '../../ledger/registry-leaf.entity.ts';
import type { besideLeaves } from './registry.store.ts';

/** An entry as anybody sees it: until the study is closed nothing but digest, date and state. */
export function registryRowView(
  { index, studyId, version, digest, sealedAt }: RegistryLeafRow,
  beside: Awaited<ReturnType<typeof besideLeaves>>,
): RegistryRow {
  const study = beside.studies.find(({ id }) => id === studyId);
  if (study === undefined || study.state === 'draft') throw new Error('an entry of the registry without its study');
  const publication = beside.publications.find((candidate) => candidate.studyId === studyId) ?? null;
  const isAmended = beside.versions.some((other) => other.studyId === studyId && other.version > version);
  const isOver = isClosed(study.state);
  const standing: RegistryState =
    study.state === 'published' && publication?.withdrawnAt != null ? 'withdrawn' : study.state;
  return {
    index,
    version,
    digest,
    sealedAt,
    state: isAmended ? 'amended' : standing,
    title: isOver ? study.title : null,
    sessions: isOver ? beside.sessions.filter((session) => session.studyId === studyId).length : null,
    publication: isOver ? (publication?.id ?? null) : null,
  };
}
