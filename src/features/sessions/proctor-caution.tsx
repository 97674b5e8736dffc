import type { Member } from '#shared/contracts/users.ts';
import { isManaging, roleWords } from '../../lib/role-words.ts';
import { Notice } from '../../ui/notice.tsx';

type ProctorCautionProps = { proctor: Member | undefined; codeHolderId: string };

/** Said before the choice is made for good: how blind a session was is published with its result. */
export function ProctorCaution({ proctor, codeHolderId }: ProctorCautionProps) {
  const reason = proctor === undefined ? null : reasonAgainst(proctor, codeHolderId);
  return (
    <div role="status" className="empty:hidden">
      {reason === null ? null : (
        <Notice tone="amber" title="This lowers the blind to listener-blind.">
          {reason} Choose a proctor who has seen neither codes nor cables, and the session can be double-blind to the
          cable. The result says which it was.
        </Notice>
      )}
    </div>
  );
}

function reasonAgainst({ id, name, role }: Member, codeHolderId: string): string | null {
  if (id === codeHolderId) return `${name} holds this study’s codes and knows which code is which cable.`;
  if (isManaging(role))
    return `As ${roleWords[role].toLowerCase()}, ${name} can open the cable pages and could know a cable by its looks.`;
  return null;
}
