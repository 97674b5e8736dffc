import type { Request } from 'express';
import type { Logger } from 'pino';
import type { DataSource } from 'typeorm';
import * as z from 'zod';
import type { Endpoint, Role } from '#shared/contracts/endpoint.ts';
import { Problem } from '#shared/problem.ts';
import { Membership } from '../features/organisations/membership.entity.ts';
import type { Mounted } from './mount.ts';
import { signedInUserId } from './sign-in.ts';

/** Who asks, as far as the endpoint's access had to find out. */
export type Caller = {
  /** The signed-in person; empty for endpoints that are open to anyone. */
  readonly userId: string;
  /** The organisation in the path, and the person's role in it; empty elsewhere. */
  readonly organisationId: string;
  readonly role: Role | null;
};

export type Access = {
  readonly db: DataSource;
  readonly log: Logger;
  /** Tests: a reply that breaks its contract is an error that names the field. */
  readonly strictReplies: boolean;
  readonly mounted: Mounted[];
};

const uuid = z.uuid();

/**
 * Finds out whether whoever sent the request may call the endpoint.
 *
 * An organisation that the person does not belong to answers exactly as one that does not exist.
 *
 * @throws Problem `not-signed-in`, `not-found` or `not-allowed`
 */
export async function callerFor(access: Access, contract: Endpoint, request: Request): Promise<Caller> {
  const userId = signedInUserId(request);
  if (contract.access === 'anyone') return { userId: userId ?? '', organisationId: '', role: null };
  if (userId === null) throw new Problem('not-signed-in', 'Sign in to go on. You come back to this page.');
  if (contract.access === 'signed-in') return { userId, organisationId: '', role: null };
  const organisationId = uuid.safeParse(request.params.organisationId);
  if (!organisationId.success) throw new Problem('not-found', 'There is nothing at this address.');
  const membership = await access.db.manager.findOneBy(Membership, { organisationId: organisationId.data, userId });
  if (membership === null) throw new Problem('not-found', 'There is nothing at this address.');
  if (!contract.access.includes(membership.role))
    throw new Problem('not-allowed', 'Your role does not include this. Ask the owner of your organisation.');
  return { userId, organisationId: organisationId.data, role: membership.role };
}
