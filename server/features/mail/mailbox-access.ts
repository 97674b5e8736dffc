import type { Request } from 'express';
import type { Config } from '../../config.ts';
import { isFromThisMachine } from '../../http/this-machine.ts';

const localHost = /^(localhost|127\.\d+\.\d+\.\d+|\[::1\])(:\d+)?$/;

/**
 * Whether this browser may read the mailbox. Mail holds links that open accounts, so the name in the address counts as
 * well as the machine: a foreign page whose name was pointed at this machine is turned away.
 */
export function mayReadMailbox(config: Config, request: Request): boolean {
  const host = request.headers.host ?? '';
  const isOurs = localHost.test(host) || host === new URL(config.publicUrl).host;
  return config.smtp === null && isOurs && isFromThisMachine(request);
}
