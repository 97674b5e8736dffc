import type { Credentials, SignedInPerson, WhoAmI } from '#shared/contracts/sign-in.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import { demoPeople } from '../../demo/demo-people.ts';
import type { Deps } from '../../deps.ts';
import { hashPassword, verifyPassword } from '../users/passwords.ts';
import type { User } from '../users/user.entity.ts';
import { findByEmail, findById, membershipsOf } from '../users/users.store.ts';

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

// Somebody without an account waits as long as somebody with a wrong password.
let nobodysHash: Promise<string> | null = null;

/** @throws Problem `wrong-credentials`, the same for an unknown address and a wrong password */
export async function checkCredentials({ db }: Deps, { email, password }: Credentials): Promise<SignedInPerson> {
  const user = await findByEmail(db.manager, email);
  nobodysHash ??= hashPassword('nobody has this password');
  const matches = await verifyPassword(user?.passwordHash ?? (await nobodysHash), password);
  if (user === null || !matches)
    throw new Problem('wrong-credentials', 'E-mail and password do not match. Check both and try again.');
  return personOf(db.manager, user);
}

/** Who is signed in; the demo's people and passwords are told only to a visitor on the server's own machine. */
export function whoIs({ db, config }: Deps, userId: string | null, onThisMachine: boolean): Promise<WhoAmI> {
  return withTransaction(db, async (tx) => {
    const user = userId === null ? null : await findById(tx, userId);
    return {
      person: user === null ? null : await personOf(tx, user),
      demoPeople:
        config.demo && onThisMachine
          ? demoPeople.map(({ name, duty, email, password }) => ({ name, duty, email, password }))
          : [],
    };
  });
}
