import type * as asn1 from 'asn1js';
import * as pkijs from 'pkijs';
import { readTimestampReply, replyFault } from './timestamp-token.ts';

/** Whatever runs this brings its cryptography: `globalThis.crypto`, which browsers withhold on plain http addresses. */
export type WebCrypto = { readonly subtle: object };

/** What a token shows: a time that it proves, a fault, or nothing, because it cannot be checked here. */
export type TokenVerdict =
  | { readonly state: 'holds'; readonly time: string }
  | { readonly state: 'fault'; readonly why: string }
  | { readonly state: 'not checkable'; readonly why: string };

const certificatePattern = /-----BEGIN CERTIFICATE-----([A-Za-z0-9+/=\s]+)-----END CERTIFICATE-----/g;

function fromBase64(text: string): Uint8Array {
  const digits = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';
  const clean = text.replaceAll(/[\s=]/g, '');
  const bits = [...clean].map((digit) => digits.indexOf(digit).toString(2).padStart(6, '0')).join('');
  return Uint8Array.from(bits.match(/.{8}/g) ?? [], (byte) => Number.parseInt(byte, 2));
}

function certificatesIn(pem: string): pkijs.Certificate[] {
  return [...pem.matchAll(certificatePattern)].map(([, body]) =>
    pkijs.Certificate.fromBER(new Uint8Array(fromBase64(body ?? '')).buffer),
  );
}

/**
 * Whether a token (RFC 3161) is for these bytes and signed by one of the certificates, or by one that they issued, and
 * good at the token's own time. What `openssl ts -verify -partial_chain -attime` asks.
 *
 * @param crypto       null where there is none
 * @param stamped      the bytes whose SHA-256 the token must carry, and that digest in hexadecimal digits
 * @param reply        the authority's reply in DER
 * @param certificates in PEM; whether they are the authority's own is for the reader
 * @see RFC 3161, Time-Stamp Protocol; RFC 5652, Cryptographic Message Syntax, section 5.6
 */
export async function tokenVerdict(
  crypto: WebCrypto | null,
  stamped: { readonly bytes: Uint8Array; readonly digest: string },
  reply: Uint8Array,
  certificates: string,
): Promise<TokenVerdict> {
  try {
    const read = readTimestampReply(reply);
    const { token } = read;
    if (token === null) return { state: 'fault', why: 'it holds no token' };
    const fault = replyFault(read, { imprint: stamped.digest, nonce: token.nonce ?? '0' });
    if (token.nonce !== null && fault !== null) return { state: 'fault', why: fault };
    if (token.imprint !== stamped.digest) return { state: 'fault', why: 'it is for something else' };
    if (crypto === null)
      return { state: 'not checkable', why: 'this browser withholds its cryptography on an address without TLS' };
    const why = await signatureFault(crypto, stamped.bytes, reply, certificates, new Date(token.time));
    return why === null ? { state: 'holds', time: token.time } : { state: 'fault', why };
  } catch (error) {
    return { state: 'fault', why: error instanceof Error ? error.message : String(error) };
  }
}

async function signatureFault(
  crypto: WebCrypto,
  bytes: Uint8Array,
  reply: Uint8Array,
  pem: string,
  time: Date,
): Promise<string | null> {
  const engine = new pkijs.CryptoEngine({ name: 'web', crypto: crypto as never });
  const response = pkijs.TimeStampResp.fromBER(new Uint8Array(reply).buffer);
  if (response.timeStampToken === undefined) return 'it holds no token';
  const signed = new pkijs.SignedData({ schema: response.timeStampToken.content });
  const trusted = certificatesIn(pem);
  const carried = (signed.certificates ?? []).filter(
    (one): one is pkijs.Certificate => one instanceof pkijs.Certificate,
  );
  signed.certificates = [...carried, ...trusted];
  const { signatureVerified, signerCertificate, message } = await signed
    .verify({ signer: 0, data: new Uint8Array(bytes).buffer, extendedMode: true, checkChain: false }, engine)
    .catch((error: unknown) => ({
      signatureVerified: false,
      signerCertificate: null,
      message: error instanceof Error ? error.message : String((error as { message?: unknown }).message ?? error),
    }));
  if (signatureVerified !== true || !(signerCertificate instanceof pkijs.Certificate))
    return `its signature does not hold${message ? ` (${message})` : ''}`;
  if (time < signerCertificate.notBefore.value || time > signerCertificate.notAfter.value)
    return 'its certificate was not good at the time that it states';
  if (!isForTime(signerCertificate)) return 'its certificate is not one for timestamps';
  for (const one of trusted) {
    if (sameBytes(one, signerCertificate)) return null;
    if (one.subject.isEqual(signerCertificate.issuer) && (await signerCertificate.verify(one, engine))) return null;
  }
  return 'no certificate in the bundle vouches for it';
}

const timeStamping = '1.3.6.1.5.5.7.3.8';

/** RFC 3161, section 2.3: the key is for timestamps alone, and says so. */
function isForTime(certificate: pkijs.Certificate): boolean {
  const usage = certificate.extensions?.find(({ extnID }) => extnID === '2.5.29.37')?.parsedValue as
    | { keyPurposes?: readonly string[] }
    | undefined;
  return usage?.keyPurposes?.includes(timeStamping) ?? false;
}

function sameBytes(a: pkijs.Certificate, b: pkijs.Certificate): boolean {
  const [left, right] = [a, b].map((one) => new Uint8Array((one.toSchema(true) as asn1.Sequence).toBER()));
  return left !== undefined && right !== undefined && left.join() === right.join();
}
