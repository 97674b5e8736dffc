import type { Config } from '../config.ts';

/** Addresses of the client's pages, for mail. What opens something stands behind the #, which no server is sent. */
export const pageAddresses = {
  codes: ({ publicUrl }: Config, organisationId: string, studyId: string) =>
    `${publicUrl}/organisations/${organisationId}/studies/${studyId}/codes`,
  console: ({ publicUrl }: Config, organisationId: string, sessionId: string) =>
    `${publicUrl}/organisations/${organisationId}/sessions/${sessionId}/console`,
};
