import type { ReactNode } from 'react';
import type { SessionRow } from '#shared/contracts/sessions.ts';
import type { WhoAmI } from '#shared/contracts/sign-in.ts';
import type { Member } from '#shared/contracts/users.ts';
import type { HomePlaces } from './home-places.ts';
import { type DemoActor, type DemoSession, ThreeMinutePath } from './three-minute-path.tsx';

export type DemoPerson = WhoAmI['demoPeople'][number];

type DemoPathProps = {
  people: readonly DemoPerson[];
  members: readonly Member[];
  /** Latest first; empty for whoever may not see them. */
  sessions: readonly SessionRow[];
  /** Studies that are known to be closed. */
  closedStudyIds: readonly string[];
  /** Who is signed in now. */
  personId: string;
  places: HomePlaces;
  renderSignIn: (person: DemoPerson, goTo: string) => ReactNode;
};

/** More than that is not done in three minutes. */
const mostTrials = 6;

/** Finds the people and the session that the path needs; without them there is no path. */
export function DemoPath({ people, members, sessions, closedStudyIds, personId, places, renderSignIn }: DemoPathProps) {
  const quick = sessions.filter(({ trials }) => trials <= mostTrials);
  const session = quick.find(isOpen) ?? quick[0] ?? null;

  function actorWith(isFit: (member: Member) => boolean): DemoActor | null {
    const member = members.find((candidate) => isFit(candidate) && people.some(({ name }) => name === candidate.name));
    const person = people.find(({ name }) => name === member?.name);
    if (member === undefined || person === undefined) return null;
    return {
      name: member.name,
      isHere: member.id === personId,
      signInButton: (goTo) => renderSignIn(person, goTo),
    };
  }

  const proctor = actorWith(({ id, role }) => (session === null ? role === 'proctor' : id === session.proctorId));
  const manager = actorWith(({ role }) => role === 'manager');
  if (proctor === null || manager === null) return null;
  return (
    <ThreeMinutePath
      session={session === null ? null : { ...session, stage: stageOf(session, closedStudyIds) }}
      proctor={proctor}
      manager={manager}
      places={places}
    />
  );
}

function isOpen({ phase }: SessionRow): boolean {
  return phase !== 'finished' && phase !== 'abandoned';
}

function stageOf(session: SessionRow, closedStudyIds: readonly string[]): DemoSession['stage'] {
  if (isOpen(session)) return 'open';
  return closedStudyIds.includes(session.studyId) ? 'study-closed' : 'ended';
}
