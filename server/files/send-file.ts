import type { Response } from 'express';
import { kindOfBytes } from './kind-of-bytes.ts';

const types = {
  text: 'text/plain; charset=utf-8',
  png: 'image/png',
  jpeg: 'image/jpeg',
  webp: 'image/webp',
  pdf: 'application/pdf',
  unknown: 'application/octet-stream',
};

/**
 * Sends kept bytes to be saved, never to be opened in place: whatever they hold, no browser runs it here.
 *
 * @param file with a clean name (`cleanName`)
 */
export function sendFile(response: Response, { name, bytes }: { name: string; bytes: Uint8Array }): void {
  const plain = name.replace(/[^ -~]/g, '_').replace(/["\\]/g, '_');
  const encoded = encodeURIComponent(name).replace(/['()*]/g, (mark) => `%${mark.charCodeAt(0).toString(16)}`);
  response
    .type(types[kindOfBytes(bytes)])
    .set('content-disposition', `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`)
    .set('x-content-type-options', 'nosniff')
    .set('content-security-policy', "default-src 'none'; sandbox")
    .send(Buffer.from(bytes));
}
