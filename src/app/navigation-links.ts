import type { Role } from '#shared/contracts/endpoint.ts';
import { paths } from './paths.ts';

type Link = { to: string; label: string };

/** The places each role has work in; what a role may not see is not offered. */
export function navigationLinks(role: Role, organisationId: string): Link[] {
  const home = { to: paths.home(organisationId), label: 'Home' };
  const studies = { to: paths.studies(organisationId), label: 'Studies' };
  const cables = { to: paths.cables(organisationId), label: 'Cables' };
  const sessions = { to: paths.sessions(organisationId), label: 'Sessions' };
  const reports = { to: paths.reports(organisationId), label: 'Reports' };
  const people = { to: paths.people(organisationId), label: 'People' };
  const places: Record<Role, Link[]> = {
    owner: [home, studies, cables, sessions, reports, people],
    manager: [home, studies, cables, sessions, reports],
    proctor: [home, sessions],
    reviewer: [home, reports],
  };
  return places[role];
}
