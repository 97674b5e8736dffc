import * as asn1 from 'asn1js';
import { bytesToHex, hexToBytes } from './digest.ts';

// RFC 3161, Time-Stamp Protocol: the request, and what a reply says. That its signature holds is for whoever has the
// cryptography at hand: `openssl ts -verify`.

const sha256Id = '2.16.840.1.101.3.4.2.1';
const signedDataId = '1.2.840.113549.1.7.2';
const tokenContentId = '1.2.840.113549.1.9.16.1.4';
const mostBytes = 200_000;

/** What an authority says in a token. */
export type TokenContent = {
  /** What was stamped: SHA-256, 64 hexadecimal digits; null where another digest was used. */
  readonly imprint: string | null;
  /** ISO 8601, to the millisecond. */
  readonly time: string;
  /** Hexadecimal digits; null where the token has none. */
  readonly nonce: string | null;
  readonly serial: string;
  readonly policy: string;
  /** The certificates that came with it, each in DER. */
  readonly certificates: readonly Uint8Array[];
};

export type TimestampReply = {
  /** 0 granted, 1 granted with modifications, others refused (RFC 3161, 2.4.2). */
  readonly status: number;
  /** The authority's own words, where it gives any. */
  readonly words: string;
  readonly token: TokenContent | null;
};

/** A reply that cannot be read as one. */
export class UnreadableReply extends Error {}

function bytesOf(value: asn1.AsnType): Uint8Array {
  return new Uint8Array(value.toBER());
}

/**
 * A request in DER for a token over a SHA-256 digest, which asks for the authority's certificate too.
 *
 * @param imprint 64 hexadecimal digits
 * @param nonce   hexadecimal digits, 16 or so, random: the reply must carry it
 */
export function timestampRequest(imprint: string, nonce: string): Uint8Array {
  const algorithm = new asn1.Sequence({ value: [new asn1.ObjectIdentifier({ value: sha256Id }), new asn1.Null()] });
  const digest = new asn1.OctetString({ valueHex: hexToBytes(imprint) });
  return bytesOf(
    new asn1.Sequence({
      value: [
        new asn1.Integer({ value: 1 }),
        new asn1.Sequence({ value: [algorithm, digest] }),
        asn1.Integer.fromBigInt(BigInt(`0x${nonce}`)),
        new asn1.Boolean({ value: true }),
      ],
    }),
  );
}

function partsOf(value: asn1.AsnType | undefined, what: string): asn1.AsnType[] {
  const parts = (value as { valueBlock?: { value?: unknown } } | undefined)?.valueBlock?.value;
  if (!Array.isArray(parts)) throw new UnreadableReply(`its ${what} cannot be read`);
  return parts as asn1.AsnType[];
}

function as<T>(type: new (...given: never[]) => T, value: unknown, what: string): T {
  if (value instanceof type) return value;
  throw new UnreadableReply(`its ${what} cannot be read`);
}

/** The part that bears a context tag, such as [0]. */
function tagged(parts: readonly asn1.AsnType[], tag: number): asn1.AsnType | undefined {
  return parts.find(({ idBlock }) => idBlock.tagClass === 3 && idBlock.tagNumber === tag);
}

const identifier = (value: unknown, what: string) => as(asn1.ObjectIdentifier, value, what).getValue();
const whole = (value: unknown, what: string) => as(asn1.Integer, value, what).toBigInt();

function octets(value: unknown, what: string): Uint8Array {
  return new Uint8Array(as(asn1.OctetString, value, what).getValue());
}

function decode(bytes: Uint8Array, what: string): asn1.AsnType {
  const { offset, result } = asn1.fromBER(bytes);
  if (offset === -1 || offset !== bytes.length) throw new UnreadableReply(`its ${what} cannot be read`);
  return result;
}

function contentOf(bytes: Uint8Array, certificates: readonly Uint8Array[]): TokenContent {
  const parts = partsOf(decode(bytes, 'content'), 'content');
  const [algorithm, digest] = partsOf(parts[2], 'imprint');
  const isSha256 = identifier(partsOf(algorithm, 'algorithm')[0], 'algorithm') === sha256Id;
  const time = as(asn1.GeneralizedTime, parts[4], 'time').toDate();
  // Accuracy is a sequence and ordering a truth value, so that the next whole number is the nonce.
  const nonce = parts.slice(5).find((part) => part instanceof asn1.Integer);
  return {
    imprint: isSha256 ? bytesToHex(octets(digest, 'imprint')) : null,
    time: time.toISOString(),
    nonce: nonce === undefined ? null : whole(nonce, 'nonce').toString(16),
    serial: whole(parts[3], 'serial number').toString(16),
    policy: identifier(parts[1], 'policy'),
    certificates,
  };
}

function tokenOf(token: asn1.AsnType): TokenContent {
  const [kind, wrapped] = partsOf(token, 'token');
  if (identifier(kind, 'token') !== signedDataId) throw new UnreadableReply('its token is not signed');
  const signed = partsOf(partsOf(wrapped, 'token')[0], 'token');
  const [contentKind, content] = partsOf(signed[2], 'content');
  if (identifier(contentKind, 'content') !== tokenContentId) throw new UnreadableReply('it holds no timestamp');
  const certificates = tagged(signed, 0);
  return contentOf(
    octets(partsOf(content, 'content')[0], 'content'),
    certificates === undefined ? [] : partsOf(certificates, 'certificates').map((one) => one.valueBeforeDecodeView),
  );
}

/**
 * Reads an authority's reply (TimeStampResp in DER).
 *
 * @throws UnreadableReply in words, for anything else
 */
export function readTimestampReply(bytes: Uint8Array): TimestampReply {
  if (bytes.length > mostBytes) throw new UnreadableReply('it is larger than a reply can be');
  try {
    const [info, token] = partsOf(decode(bytes, 'frame'), 'frame');
    const [status, ...others] = partsOf(info, 'status');
    const words = others.find((part) => part instanceof asn1.Sequence);
    return {
      status: Number(whole(status, 'status')),
      words:
        words === undefined
          ? ''
          : partsOf(words, 'status')
              .map((word) => as(asn1.Utf8String, word, 'status').getValue())
              .join('; '),
      token: token === undefined ? null : tokenOf(token),
    };
  } catch (error) {
    if (error instanceof UnreadableReply) throw error;
    throw new UnreadableReply('it cannot be read', { cause: error });
  }
}

/**
 * Why a reply is no token for what was asked, or null when it is one. The signature is not looked at.
 *
 * @param asked imprint and nonce of the request, in hexadecimal digits
 * @see RFC 3161, section 2.4.2
 */
export function replyFault({ status, words, token }: TimestampReply, asked: { imprint: string; nonce: string }) {
  const said = words === '' ? '' : `: ${words}`;
  if (status !== 0 && status !== 1) return `the authority refused (status ${status})${said}`;
  if (token === null) return 'the authority granted it and sent no token';
  if (token.imprint !== asked.imprint) return 'the token is for something else than was asked';
  // A number's digits: what was asked may begin with zeros, and a bent reply may be negative.
  if (token.nonce !== BigInt(`0x${asked.nonce}`).toString(16))
    return 'the token does not carry the number that was sent with the question';
  return null;
}
