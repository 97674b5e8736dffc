import type { Role } from '#shared/contracts/endpoint.ts';
import type { PersonRow } from '#shared/contracts/people.ts';
import { formatCount } from '../../lib/format.ts';
import { isManaging } from '../../lib/role-words.ts';

const asRole: Record<Role, string> = {
  owner: 'An owner decides who belongs to the organisation, and sees and does whatever a product manager can.',
  manager: 'A product manager sees the cables, and plans, seals and closes studies.',
  proctor: 'A proctor runs sessions and sees no cables.',
  reviewer: 'A reviewer reads reports and can hold a study’s codes. Consoles that this person has open end at once.',
};

/** What another role brings, and what it does to the blind. */
export function roleConsequence(person: PersonRow, role: Role): string {
  if (isManaging(role))
    return `${asRole[role]} Whoever has seen the cables caps the blind: a study whose sessions they run is listener-blind at most.`;
  if (isManaging(person.role))
    return `${asRole[role]} ${person.name} has seen the cables: a study whose sessions they run stays listener-blind at most.`;
  return asRole[role];
}

/** What would be left without somebody. */
export function removalConsequence({ name, sessionsToRun, codesHeld }: PersonRow): string {
  const lost = `${name} loses access at once, and consoles they have open end. What they did stays under their name.`;
  const duties = [
    sessionsToRun > 0 ? `the proctor of ${formatCount(sessionsToRun, 'session')} not yet ended` : null,
    codesHeld > 0 ? `the code holder of ${formatCount(codesHeld, 'study', 'studies')} not yet closed` : null,
  ].filter((duty) => duty !== null);
  if (duties.length === 0) return lost;
  return `${lost} They are ${duties.join(' and ')}, which nobody can take over: it is better to let that end first.`;
}
