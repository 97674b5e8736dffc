import { registryPath } from '#shared/contracts/registry.ts';

/** Every address of the application. The route table is built from the same functions. */
export const paths = {
  start: () => '/',
  /** With a way back to where one was. */
  signIn: (next?: string) => (next === undefined ? '/sign-in' : `/sign-in?${new URLSearchParams({ next })}`),
  help: () => '/help',
  kit: () => '/kit',
  account: () => '/account',
  invitation: () => '/invitation',
  firstOwner: () => '/first-owner',
  forgottenPassword: () => '/forgotten-password',
  newPassword: () => '/new-password',
  mailbox: () => '/mailbox',
  mailboxMail: (id: string) => `/mailbox/${id}`,

  /** Public: what is published, for anybody. */
  publications: () => '/p',
  publication: (id: string) => `/p/${id}`,
  registry: registryPath,
  /** For whoever brings a file of a publication. */
  verify: () => '/verify',

  home: (organisationId: string) => organisation(organisationId),

  cables: (organisationId: string) => `${organisation(organisationId)}/cables`,
  newCable: (organisationId: string) => `${organisation(organisationId)}/cables/new`,
  cable: (organisationId: string, id: string) => `${organisation(organisationId)}/cables/${id}`,
  editCable: (organisationId: string, id: string) => `${organisation(organisationId)}/cables/${id}/edit`,

  importCables: (organisationId: string) => `${organisation(organisationId)}/cables/import`,
  compareCables: (organisationId: string, first?: string) =>
    `${organisation(organisationId)}/cables/compare${first === undefined ? '' : `?${new URLSearchParams({ first })}`}`,
  /** Of one piece, where it is known already. */
  newMeasurement: (organisationId: string, cableId: string, specimenId?: string) =>
    `${organisation(organisationId)}/cables/${cableId}/measurements/new${specimenId === undefined ? '' : `?${new URLSearchParams({ specimen: specimenId })}`}`,
  measurement: (organisationId: string, cableId: string, id: string) =>
    `${organisation(organisationId)}/cables/${cableId}/measurements/${id}`,

  studies: (organisationId: string) => `${organisation(organisationId)}/studies`,
  /** With two cables that the form begins with. */
  newStudy: (organisationId: string, cables?: readonly [string, string]) =>
    `${organisation(organisationId)}/studies/new${cables === undefined ? '' : `?${new URLSearchParams({ first: cables[0], second: cables[1] })}`}`,
  study: (organisationId: string, id: string) => `${organisation(organisationId)}/studies/${id}`,
  editStudy: (organisationId: string, id: string) => `${organisation(organisationId)}/studies/${id}/edit`,
  amendStudy: (organisationId: string, id: string) => `${organisation(organisationId)}/studies/${id}/amend`,
  codes: (organisationId: string, studyId: string) => `${organisation(organisationId)}/studies/${studyId}/codes`,
  labels: (organisationId: string, studyId: string) => `${organisation(organisationId)}/studies/${studyId}/labels`,
  report: (organisationId: string, studyId: string) => `${organisation(organisationId)}/studies/${studyId}/report`,
  publish: (organisationId: string, studyId: string) => `${organisation(organisationId)}/studies/${studyId}/publish`,
  reports: (organisationId: string) => `${organisation(organisationId)}/reports`,

  rigPresets: (organisationId: string) => `${organisation(organisationId)}/rig-presets`,
  editRigPreset: (organisationId: string, id: string) => `${organisation(organisationId)}/rig-presets/${id}/edit`,
  /** A copy of another. */
  newRigPreset: (organisationId: string, id: string) => `${organisation(organisationId)}/rig-presets/${id}/copy`,

  people: (organisationId: string) => `${organisation(organisationId)}/people`,
  invitations: (organisationId: string) => `${organisation(organisationId)}/people/invitations`,
  mail: (organisationId: string) => `${organisation(organisationId)}/mail`,
  proof: (organisationId: string) => `${organisation(organisationId)}/proof`,

  sessions: (organisationId: string) => `${organisation(organisationId)}/sessions`,
  planSession: (organisationId: string, studyId: string) =>
    `${organisation(organisationId)}/studies/${studyId}/sessions/new`,
  session: (organisationId: string, id: string) => `${organisation(organisationId)}/sessions/${id}`,
  levels: (organisationId: string, id: string) => `${organisation(organisationId)}/sessions/${id}/levels`,
  console: (organisationId: string, id: string) => `${organisation(organisationId)}/sessions/${id}/console`,
};

const organisation = (organisationId: string) => `/organisations/${organisationId}`;
