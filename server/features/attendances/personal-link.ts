import { createHmac, timingSafeEqual } from 'node:crypto';
import type { Config } from '../../config.ts';

// A later mail must carry the same link, so it is made anew from the server's secret rather than stored: a copy of the
// database opens no seat.

const macOf = ({ sessionSecret }: Config, purpose: string, attendanceId: string) =>
  createHmac('sha256', sessionSecret).update(`fairlead/${purpose}/1\0${attendanceId}`).digest();

const bytesOf = (id: string) => Buffer.from(id.replaceAll('-', ''), 'hex');

/** The token of the link that is somebody's attendance: its id and a code over it, 256 bits. */
export function linkTokenOf(config: Config, attendanceId: string): string {
  return tokenOf(config, 'personal-link', attendanceId);
}

/** The token of an observer's link, made in the same way. */
export function observerTokenOf(config: Config, observerId: string): string {
  return tokenOf(config, 'observer-link', observerId);
}

function tokenOf(config: Config, purpose: string, id: string): string {
  return Buffer.concat([bytesOf(id), macOf(config, purpose, id)]).toString('base64url');
}

/** Whose attendance a link's token is; null when this server did not make it. */
export const attendanceIn = (config: Config, token: string) => idIn(config, 'personal-link', token);

/** Whose link as an observer a token is; null when this server did not make it. */
export const observerIn = (config: Config, token: string) => idIn(config, 'observer-link', token);

function idIn(config: Config, purpose: string, token: string): string | null {
  const bytes = Buffer.from(token, 'base64url');
  if (bytes.length !== 48) return null;
  const id = bytes
    .subarray(0, 16)
    .toString('hex')
    .replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
  return timingSafeEqual(bytes.subarray(16), macOf(config, purpose, id)) ? id : null;
}

/** The token of the seat that an attendance takes: the same on every phone that opens the link. */
export function seatTokenOf(config: Config, attendanceId: string): string {
  return macOf(config, 'linked-seat', attendanceId).toString('base64url');
}
