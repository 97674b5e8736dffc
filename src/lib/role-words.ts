import type { Role } from '#shared/contracts/endpoint.ts';

export const roleWords: Record<Role, string> = {
  owner: 'Owner',
  manager: 'Product manager',
  proctor: 'Proctor',
  reviewer: 'Reviewer',
};

/** Plans and reads studies, and has seen the cables they compare. */
export function isManaging(role: Role): boolean {
  return role === 'owner' || role === 'manager';
}
