import QRCode from 'qrcode';

/** A QR code as SVG text, with the quiet zone that scanners need. */
export function qrSvg(text: string): Promise<string> {
  return QRCode.toString(text, { type: 'svg', errorCorrectionLevel: 'M', margin: 4 });
}
