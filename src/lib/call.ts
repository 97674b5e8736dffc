import * as core from 'zod/v4/core';
import type { BodyInput, Endpoint, ParamsOf, QueryOf, ReplyOf } from '#shared/contracts/endpoint.ts';
import { Problem } from '#shared/problem.ts';

type Part<Name extends string, T> = undefined extends T ? { [K in Name]?: never } : { [K in Name]: T };
/** A file goes with the input of a contract that takes an upload. */
type FileInput = { file?: File };
type QueryInput<E> = QueryOf<E> extends undefined ? { query?: never } : { query?: Partial<QueryOf<E>> };

/** What a call of an endpoint needs: its parameters, query and body, as far as its contract has them. */
export type CallInput<E> = Part<'params', ParamsOf<E>> & Part<'body', BodyInput<E>> & QueryInput<E> & FileInput;

/** Where an endpoint is, for a link that downloads what it replies. */
export function addressOf(contract: Endpoint, params: object, query: object = {}): string {
  const values = new Map<string, unknown>(Object.entries(params));
  const path = contract.path.replace(/:([a-zA-Z]+)/g, (_, name: string) =>
    encodeURIComponent(String(values.get(name))),
  );
  const search = new URLSearchParams();
  for (const [key, value] of Object.entries(query)) if (value !== undefined) search.set(key, String(value));
  const tail = search.toString();
  return `/api${path}${tail === '' ? '' : `?${tail}`}`;
}

async function send(address: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(address, init);
  } catch {
    throw new Problem(
      'unreachable',
      'Fairlead cannot be reached. What you typed is still here; check the connection and try again.',
    );
  }
}

/**
 * Calls an endpoint by its contract and reads the reply by it.
 *
 * @throws Problem for everything that is refused, and `unreachable` when no answer came
 */
export async function call<E extends Endpoint>(
  contract: E,
  input: CallInput<E>,
  signal?: AbortSignal,
): Promise<ReplyOf<E>> {
  const {
    params = {},
    query = {},
    body,
    file,
  } = input as {
    params?: object;
    query?: object;
    body?: unknown;
    file?: File;
  };
  const init: RequestInit = { method: contract.method, headers: { accept: 'application/json' } };
  if (signal !== undefined) init.signal = signal;
  if (file !== undefined) init.body = messageOf(file, body);
  else if (body !== undefined) {
    init.body = JSON.stringify(body);
    init.headers = { accept: 'application/json', 'content-type': 'application/json' };
  }
  const response = await send(addressOf(contract, params, query), init);
  const text = await response.text();
  const value: unknown = parseJson(text);
  if (!response.ok) throw Problem.fromBody(value);
  const reply = core.safeParse(contract.reply, value);
  if (!reply.success) throw new Problem('internal', 'The answer could not be read. Please reload the page.');
  return reply.data as ReplyOf<E>;
}

function messageOf(file: File, body: unknown): FormData {
  const message = new FormData();
  message.set('body', JSON.stringify(body ?? {}));
  message.set('file', file);
  return message;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
