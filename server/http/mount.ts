import type { Request, RequestHandler, Response, Router } from 'express';
import * as core from 'zod/v4/core';
import {
  type BodyOf,
  type Endpoint,
  type ParamsOf,
  type QueryOf,
  type ReplyOf,
  savedFile,
} from '#shared/contracts/endpoint.ts';
import { type InputFault, Problem } from '#shared/problem.ts';
import { receiveUpload, type Upload } from '../files/receive-upload.ts';
import { sendFile } from '../files/send-file.ts';
import { type Access, type Caller, callerFor } from './access.ts';

export type Handled<E> = {
  params: ParamsOf<E>;
  query: QueryOf<E>;
  body: BodyOf<E>;
  /** The file that came with it; null where its contract takes none, or none was sent. */
  upload: Upload | null;
  request: Request;
  response: Response;
};

/** Every contract that has been mounted, for the guards and the API reference. */
export type Mounted = { readonly contract: Endpoint };

const pointerTo = (path: readonly PropertyKey[]) => path.map((part) => `/${String(part)}`).join('');

function faultsOf(error: core.$ZodError, where: string): InputFault[] {
  return error.issues.flatMap((issue) => {
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({
        pointer: `${where}${pointerTo([...issue.path, key])}`,
        detail: 'Not a known field',
      }));
    return [{ pointer: `${where}${pointerTo(issue.path)}`, detail: issue.message }];
  });
}

function parseInput(contract: Endpoint, request: Request, upload: Upload | null) {
  const faults: InputFault[] = [];
  const read = (schema: core.$ZodType | undefined, value: unknown, where: string): unknown => {
    if (schema === undefined) return undefined;
    const parsed = core.safeParse(schema, value);
    if (parsed.success) return parsed.data;
    faults.push(...faultsOf(parsed.error, where));
    return undefined;
  };
  const params = read(contract.params, request.params, '/path');
  // A malformed address leads nowhere; it is not a fault in what somebody typed.
  if (faults.length > 0) throw new Problem('not-found', 'There is nothing at this address.');
  const query = read(contract.query, request.query, '/query');
  const body = read(contract.body, request.body, '');
  if (contract.upload?.isRequired && upload === null) faults.push({ pointer: '/file', detail: 'Choose a file' });
  if (upload?.bytes.length === 0) faults.push({ pointer: '/file', detail: 'This file is empty' });
  if (faults.length > 0) throw new Problem('invalid-input', 'Please mend what is marked; nothing was saved.', faults);
  return { params, query, body };
}

/** The value without the fields that its contract does not know; they are never sent. */
function withoutUnknown(value: unknown, issues: readonly core.$ZodIssue[]): unknown {
  const copy = structuredClone(value);
  for (const issue of issues) {
    if (issue.code !== 'unrecognized_keys') continue;
    const holder = issue.path.reduce<unknown>((at, key) => (at as Record<PropertyKey, unknown>)[key], copy);
    for (const key of issue.keys) delete (holder as Record<string, unknown>)[key];
  }
  return copy;
}

function parseReply(contract: Endpoint, value: unknown, access: Access): unknown {
  const parsed = core.safeParse(contract.reply, value);
  if (parsed.success) return parsed.data;
  const { issues } = parsed.error;
  const where = issues.map((issue) => `${pointerTo(issue.path)}: ${issue.message}`).join('; ');
  const broken = new Error(`The reply of ${contract.method} ${contract.path} breaks its contract: ${where}`);
  if (access.strictReplies) throw broken;
  access.log.error({ err: broken }, 'a reply breaks its contract');
  const stripped = core.safeParse(contract.reply, withoutUnknown(value, issues));
  if (!stripped.success) throw broken;
  return stripped.data;
}

/**
 * Mounts one endpoint: access, input, handler, strict reply. The only way to add a route to the API.
 *
 * @param before extra middleware of this route, such as a rate limit
 */
export function mount<E extends Endpoint>(
  router: Router,
  access: Access,
  contract: E,
  handler: (input: Handled<E>, who: Caller) => Promise<ReplyOf<E>>,
  ...before: RequestHandler[]
): void {
  access.mounted.push({ contract });
  const verb = contract.method.toLowerCase() as 'get' | 'post' | 'put' | 'delete';
  router[verb](contract.path, ...before, async (request, response) => {
    const who = await callerFor(access, contract, request);
    const upload =
      contract.upload === undefined ? null : await receiveUpload(request, response, contract.upload.limitBytes);
    const input = parseInput(contract, request, upload);
    const value = await handler({ ...input, upload, request, response } as Handled<E>, who);
    const reply = parseReply(contract, value, access);
    if (contract.isDownload) sendFile(response, savedFile.parse(reply));
    else response.json(reply);
  });
}
