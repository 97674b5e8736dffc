import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import type { Tx } from '../db/transaction.ts';
import type { Random } from '../deps.ts';
import { codeIsTaken } from '../features/sessions/sessions.store.ts';
import { qrSvg } from '../qr/qr-svg.ts';

// 32 characters that cannot be taken for one another: five bits each.
const alphabet = '23456789ABCDEFGHJKLMNPQRSTUVWXYZ';

/** A session code that no other open session has. */
export async function newSessionCode(tx: Tx, random: Random): Promise<string> {
  for (;;) {
    const code = [...random.bytes('session-code', 6)].map((byte) => alphabet[byte % 32]).join('');
    if (!(await codeIsTaken(tx, code))) return code;
  }
}

const isLoopback = (host: string) => host === 'localhost' || host === '[::1]' || /^127\./.test(host);

/** How listeners join. On a loopback address no phone can follow a QR code, so there is none. */
export async function joinOf(publicUrl: string, code: string): Promise<NonNullable<ProctorView['join']>> {
  const address = `${publicUrl}/listen/${code}`;
  const qr = isLoopback(new URL(publicUrl).hostname) ? null : await qrSvg(address);
  return { code, address, qrSvg: qr };
}
