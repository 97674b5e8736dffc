import { X509Certificate } from 'node:crypto';
import { type HeadSignature, statementBytes, statementDigest } from '#shared/ledger/signed-head.ts';
import { readTimestampReply, replyFault, timestampRequest } from '#shared/ledger/timestamp-token.ts';
import type { TimestampAuthority } from './authority.ts';
import { tokenSignatureFault } from './openssl.ts';
import type { TimestampToken } from './timestamp-token.entity.ts';

/**
 * Fetches the token of a signed head and checks it: granted, for this statement, with the number that was sent, and
 * signed by its certificate.
 *
 * @param nonce 16 hexadecimal digits, random
 * @throws Error in words that the owner reads, when no good token came
 */
export async function fetchToken(
  authority: TimestampAuthority,
  signature: HeadSignature,
  nonce: string,
): Promise<Omit<TimestampToken, 'attempts' | 'receivedAt'>> {
  const imprint = statementDigest(signature);
  const request = timestampRequest(imprint, nonce);
  const reply = await authority.ask(request);
  const read = readTimestampReply(reply);
  const fault = replyFault(read, { imprint, nonce });
  const { token } = read;
  if (fault !== null || token === null) throw new Error(fault ?? 'it holds no token');
  const own = token.certificates.map((der) => new X509Certificate(der).toString());
  if (own.length === 0) throw new Error('the token came without the certificate that was asked for');
  const certificates = authority.trusted ?? own.join('');
  const time = Date.parse(token.time);
  const unsigned = await tokenSignatureFault(statementBytes(signature), reply, certificates, Math.floor(time / 1000));
  if (unsigned !== null) throw new Error(`its signature does not hold: ${unsigned}`);
  return {
    studyId: signature.study,
    sequence: signature.sequence,
    imprint,
    authority: authority.name,
    isLocal: authority.isLocal,
    time: token.time,
    gapMs: time - Date.parse(signature.at),
    serial: token.serial,
    request: Buffer.from(request),
    reply: Buffer.from(reply),
    // A root that is trusted does not confirm the token alone where an intermediate certificate stands between.
    certificates: authority.trusted === null ? certificates : [...new Set([authority.trusted, ...own])].join(''),
  };
}
