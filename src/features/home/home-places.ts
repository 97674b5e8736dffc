/** Where a home leads; the page knows the addresses. */
export type HomePlaces = {
  readonly start: string;
  readonly study: (id: string) => string;
  readonly editStudy: (id: string) => string;
  readonly codes: (studyId: string) => string;
  readonly planSession: (studyId: string) => string;
  readonly levels: (sessionId: string) => string;
  readonly console: (sessionId: string) => string;
  readonly report: (studyId: string) => string;
  readonly newCable: string;
  readonly newStudy: string;
  readonly sessions: string;
  readonly reports: string;
  readonly people: string;
};
