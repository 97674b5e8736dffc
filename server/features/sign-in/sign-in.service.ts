import type { Credentials, SignedInPerson, WhoAmI } from '#shared/contracts/sign-in.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import { demoPeople } from '../../demo/demo-people.ts';
import type { Deps } from '../../deps.ts';
import { hashPassword, verifyPassword } from '../users/passwords.ts';
import type { User } from '../users/user.entity.ts';
import { findByEmail, findById, membershipsOf } from '../users/users.store.ts';
import { SignInAttempt } from './sign-in-attempt.entity.ts';

async function personOf(tx: Tx, user: User): Promise<SignedInPerson> {
  const memberships = await membershipsOf(tx, user.id);
  return {
    id: user.id,
    name: user.name,
    email: user.email,
    memberships: memberships.map(({ organisationId, organisation, role }) => ({
      organisationId,
      organisation: organisation.name,
      role,
    })),
  };
}

export async function signedInPersonById({ db }: Deps, id: string): Promise<SignedInPerson> {
  const user = await findById(db.manager, id);
  if (user === null) throw new Problem('not-signed-in', 'Sign in to go on.');
  return personOf(db.manager, user);
}

// Somebody without an account waits as long as somebody with a wrong password.
let nobodysHash: Promise<string> | null = null;

/** @throws Problem `wrong-credentials`, the same for an unknown address and a wrong password */
export async function checkCredentials(
  deps: Deps,
  { email, password }: Credentials,
  origin: { address: string; browser: string },
): Promise<SignedInPerson> {
  const { db, config } = deps;
  const user = await findByEmail(db.manager, email);
  nobodysHash ??= hashPassword('nobody has this password');
  // The demo's passwords are public; without the demo they open nothing, whatever an earlier start has left behind.
  const isClosed = !config.demo && user !== null && isDemoPerson(user);
  const matches = !isClosed && (await verifyPassword(user?.passwordHash ?? (await nobodysHash), password));
  if (user !== null) await noteAttempt(deps, user.id, matches, origin);
  if (user === null || !matches)
    throw new Problem('wrong-credentials', 'E-mail and password do not match. Check both and try again.');
  return personOf(db.manager, user);
}

const isDemoPerson = ({ email }: User) => demoPeople.some((person) => person.email === email);

async function noteAttempt(
  { db, random, clock }: Deps,
  userId: string,
  succeeded: boolean,
  origin: { address: string; browser: string },
): Promise<void> {
  await db.manager.insert(SignInAttempt, {
    id: random.id(),
    userId,
    at: new Date(clock.now()),
    succeeded,
    ...origin,
  });
}

/** Who is signed in; the demo's people and passwords are told only to a visitor on the server's own machine. */
export function whoIs(
  { db, config }: Deps,
  userId: string | null,
  { onThisMachine, mailbox }: { onThisMachine: boolean; mailbox: boolean },
): Promise<WhoAmI> {
  return withTransaction(db, async (tx) => {
    const user = userId === null ? null : await findById(tx, userId);
    return {
      person: user === null ? null : await personOf(tx, user),
      demoPeople:
        config.demo && onThisMachine
          ? demoPeople.map(({ name, duty, email, password }) => ({ name, duty, email, password }))
          : [],
      mailbox,
    };
  });
}
