import { z } from 'zod';
import { allMembers, endpoint } from './endpoint.ts';
import { thingParams } from './organisation-params.ts';

/** How far the code holder has come; carries no code. */
export const codesStatus = z.strictObject({
  studyId: z.uuid(),
  title: z.string(),
  /** Codes are drawn for a sealed protocol only. */
  isSealed: z.boolean(),
  state: z.enum(['none', 'drawn', 'confirmed']),
  specimenCount: z.int(),
  codeHolder: z.string(),
  youHoldCodes: z.boolean(),
  commitment: z.string().nullable(),
  /** When the codes drawn before became void by an amendment; null where none did or others are drawn. */
  voidedAt: z.iso.datetime().nullable(),
  openings: z.array(z.strictObject({ at: z.iso.datetime(), by: z.string(), purpose: z.string() })),
});
export type CodesStatus = z.output<typeof codesStatus>;

/** The code holder's sheet: which code belongs on which specimen. Sent to the code holder alone; each sending is on the record. */
export const codeSheet = z.strictObject({
  title: z.string(),
  /** The study's mark on every label. */
  mark: z.string(),
  rows: z.array(
    z.strictObject({
      code: z.string(),
      cable: z.string(),
      serial: z.string(),
      /** The two labels, one for either end. */
      labels: z.array(
        z.strictObject({ end: z.union([z.literal(1), z.literal(2)]), scanText: z.string(), qrSvg: z.string() }),
      ),
    }),
  ),
});
export type CodeSheet = z.output<typeof codeSheet>;

const base = '/organisations/:organisationId/studies/:id/codes';
const nothing = z.strictObject({});

export const codesApi = {
  status: endpoint({
    method: 'GET',
    path: base,
    summary: 'How far the blind codes are',
    access: allMembers,
    params: thingParams,
    reply: codesStatus,
  }),
  draw: endpoint({
    method: 'POST',
    path: `${base}/draw`,
    summary: 'Draw the blind codes and commit to the code key (code holder)',
    access: allMembers,
    params: thingParams,
    body: nothing,
    reply: codesStatus,
  }),
  open: endpoint({
    method: 'POST',
    path: `${base}/open`,
    summary: 'Open the code sheet; the opening is recorded (code holder)',
    access: allMembers,
    params: thingParams,
    body: z.strictObject({ purpose: z.enum(['labels', 'check']) }),
    reply: codeSheet,
  }),
  confirm: endpoint({
    method: 'POST',
    path: `${base}/confirm`,
    summary: 'Confirm that every specimen is sleeved and coded at both ends (code holder)',
    access: allMembers,
    params: thingParams,
    body: nothing,
    reply: codesStatus,
  }),
};
