const patienceMs = 15_000;
const mostBytes = 200_000;

/** Who stamps time (RFC 3161). */
export type TimestampAuthority = {
  /** How it is called wherever a token is shown. */
  readonly name: string;
  /** On this machine, by this program: it proves nothing about time. */
  readonly isLocal: boolean;
  /** Certificates to trust, in PEM; null trusts those that come with the first token and keeps them with it. */
  readonly trusted: string | null;
  /** Takes a request in DER and returns the reply, unread. @throws Error when none comes */
  ask(request: Uint8Array): Promise<Uint8Array>;
};

async function bodyOf(response: Response): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of response.body ?? []) {
    bytes += chunk.length;
    if (bytes > mostBytes) throw new Error('the reply is larger than a reply can be');
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}

/** The innermost reason: fetch says only that it failed. */
function reasonOf(error: unknown): string {
  if (!(error instanceof Error)) return String(error);
  if (error.name === 'TimeoutError') return `no reply within ${patienceMs / 1000} s`;
  return error.cause instanceof Error ? error.cause.message || String(error.cause) : error.message;
}

/** An authority that is asked over HTTP (RFC 3161, section 3.4). */
export function httpAuthority(url: string, trusted: string | null): TimestampAuthority {
  return {
    name: new URL(url).host,
    isLocal: false,
    trusted,
    ask: async (request) => {
      try {
        const response = await fetch(url, {
          method: 'POST',
          headers: { 'content-type': 'application/timestamp-query', accept: 'application/timestamp-reply' },
          body: Buffer.from(request),
          signal: AbortSignal.timeout(patienceMs),
        });
        if (!response.ok) throw new Error(`the service answered with ${response.status}`);
        return await bodyOf(response);
      } catch (error) {
        throw new Error(reasonOf(error));
      }
    },
  };
}
