import { withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { answerInvitation } from '../features/attendances/answering.service.ts';
import { attendancesOf } from '../features/attendances/attendances.store.ts';
import { inviteListeners } from '../features/attendances/inviting.service.ts';
import { linkTokenOf } from '../features/attendances/personal-link.ts';

/** Addresses under a name that no mail can reach (RFC 2606), in the order of the seats, with their answers. */
const demoListeners: readonly { email: string; coming: boolean | null }[] = [
  { email: 'aino.vesterholm@listeners.example', coming: true },
  { email: 'pico.amarante@listeners.example', coming: false },
  { email: 'roos.dekkerma@listeners.example', coming: null },
  { email: 'teodor.lindqvaern@listeners.example', coming: null },
];

type Who = { organisationId: string; userId: string };

/** Invites by address, and hands out the personal links in the same order. */
export async function demoLinks(deps: Deps, who: Who, sessionId: string, addresses: readonly string[]) {
  await inviteListeners(deps, { ...who, role: 'manager' }, sessionId, { addresses });
  const attendances = await withTransaction(deps.db, (tx) => attendancesOf(tx, sessionId));
  return attendances.map(({ id }) => linkTokenOf(deps.config, id));
}

/** Invites the demo's listeners to a session and gives their answers: one comes, one does not, one moved up, one waits. */
export async function inviteDemoListeners(deps: Deps, who: Who, sessionId: string): Promise<void> {
  const addresses = demoListeners.map(({ email }) => email);
  const links = await demoLinks(deps, who, sessionId, addresses);
  for (const [index, { coming }] of demoListeners.entries()) {
    const link = links[index];
    if (link !== undefined && coming !== null) await answerInvitation(deps, link, coming);
  }
}
