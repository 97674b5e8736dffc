import type { Request } from 'express';

const loopback = /^(::1|(::ffff:)?127\.\d+\.\d+\.\d+)$/;

/**
 * Whether the request comes from the server's own machine, straight and through no proxy: over loopback, or from one of
 * the machine's addresses to itself.
 */
export function isFromThisMachine(request: Pick<Request, 'socket' | 'headers'>): boolean {
  const forwarded = request.headers['x-forwarded-for'] ?? request.headers.forwarded;
  const { remoteAddress = '', localAddress } = request.socket;
  return forwarded === undefined && (loopback.test(remoteAddress) || remoteAddress === localAddress);
}
