import type { Request } from 'express';

const loopback = /^(::1|(::ffff:)?127\.\d+\.\d+\.\d+)$/;

/** Whether the request comes from the server's own machine, straight and through no proxy. */
export function isFromThisMachine(request: Pick<Request, 'socket' | 'headers'>): boolean {
  const forwarded = request.headers['x-forwarded-for'] ?? request.headers.forwarded;
  return forwarded === undefined && loopback.test(request.socket.remoteAddress ?? '');
}
