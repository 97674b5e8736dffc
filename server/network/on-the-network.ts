import { toString as qrText } from 'qrcode';
import type { OwnCertificate } from './own-certificate.ts';

/** What the terminal says to somebody who wants phones to come in. */
export async function onTheNetwork(
  publicUrl: string,
  tlsPort: number,
  { fingerprint }: Pick<OwnCertificate, 'fingerprint'>,
): Promise<string> {
  const { hostname } = new URL(publicUrl);
  const qr = await qrText(publicUrl, { type: 'utf8', errorCorrectionLevel: 'M' });
  return `
Phones and other computers on this network reach it there too:

${qr}
Under TLS: https://${hostname}:${tlsPort}
  This machine signed the certificate itself, so a browser warns once. Go on only if it shows this SHA-256 fingerprint:
  ${fingerprint.slice(0, 47)}
  ${fingerprint.slice(48)}
  What phones can do without TLS: docs/guides/on-the-local-network.md`;
}
