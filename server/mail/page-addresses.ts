import type { Config } from '../config.ts';

/** Addresses of the client's pages, for mail. What opens something stands behind the #, which no server is sent. */
export const pageAddresses = {
  codes: ({ publicUrl }: Config, organisationId: string, studyId: string) =>
    `${publicUrl}/organisations/${organisationId}/studies/${studyId}/codes`,
  console: ({ publicUrl }: Config, organisationId: string, sessionId: string) =>
    `${publicUrl}/organisations/${organisationId}/sessions/${sessionId}/console`,
  session: ({ publicUrl }: Config, organisationId: string, sessionId: string) =>
    `${publicUrl}/organisations/${organisationId}/sessions/${sessionId}`,
  proof: ({ publicUrl }: Config, organisationId: string) => `${publicUrl}/organisations/${organisationId}/proof`,
  personalLink: ({ publicUrl }: Config, token: string) => `${publicUrl}/listen/invitation#${token}`,
  observer: ({ publicUrl }: Config, token: string) => `${publicUrl}/observe#${token}`,
  invitation: ({ publicUrl }: Config, token: string) => `${publicUrl}/invitation#${token}`,
  newPassword: ({ publicUrl }: Config, token: string) => `${publicUrl}/new-password#${token}`,
  forgottenPassword: ({ publicUrl }: Config) => `${publicUrl}/forgotten-password`,
  firstOwner: ({ publicUrl }: Config, token: string) => `${publicUrl}/first-owner#${token}`,
  start: ({ publicUrl }: Config) => publicUrl,
};
