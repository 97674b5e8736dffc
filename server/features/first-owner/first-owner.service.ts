import type { FirstOwnerDraft } from '#shared/contracts/links.ts';
import { Problem } from '#shared/problem.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { linkTokenDigest, newLinkToken } from '../../http/link-token.ts';
import { Membership } from '../organisations/membership.entity.ts';
import { Organisation } from '../organisations/organisation.entity.ts';
import { insertMember } from '../people/people.store.ts';
import { hashPassword } from '../users/passwords.ts';
import { insertUser } from '../users/users.store.ts';

/**
 * The way in where nobody is yet: a link for whoever can read the server's terminal, once. It lives in memory alone; a
 * restart ends it and prints another.
 */
export class FirstOwner {
  readonly #deps: Deps;
  #digest: string | null = null;

  constructor(deps: Deps) {
    this.#deps = deps;
  }

  /** A new link's token when no organisation of one's own has an owner; the demo does not count. */
  async offer(): Promise<string | null> {
    const owners = await this.#deps.db.manager.countBy(Membership, { role: 'owner', organisation: { demo: false } });
    if (owners > 0) return null;
    const { token, digest } = newLinkToken(this.#deps.random);
    this.#digest = digest;
    return token;
  }

  async create({ token, organisation, name, email, password }: FirstOwnerDraft): Promise<string> {
    const digest = linkTokenDigest(token);
    if (this.#digest !== digest)
      throw new Problem('too-late', 'This link has been used, or the server was started again. Read its terminal.');
    // Taken before anything is awaited, so that two at once cannot both use it; given back when it came to nothing.
    this.#digest = null;
    try {
      return await this.#insert({ organisation, name, email, password });
    } catch (error) {
      this.#digest = digest;
      throw error;
    }
  }

  async #insert(draft: Omit<FirstOwnerDraft, 'token'>): Promise<string> {
    const { db, random, clock } = this.#deps;
    const passwordHash = await hashPassword(draft.password);
    return withTransaction(db, async (tx) => {
      const now = new Date(clock.now());
      const organisationId = random.id();
      const userId = random.id();
      await tx.insert(Organisation, { id: organisationId, name: draft.organisation, demo: false, createdAt: now });
      await insertUser(tx, {
        id: userId,
        email: draft.email.toLowerCase(),
        name: draft.name,
        passwordHash,
        createdAt: now,
      });
      await insertMember(tx, { organisationId, userId, role: 'owner', joinedAt: now });
      return userId;
    });
  }
}
