/** A fingerprint in groups of four, as it is read out. */
export function readableFingerprint(fingerprint: string): string {
  return (fingerprint.match(/.{1,4}/g) ?? []).join(' ');
}
