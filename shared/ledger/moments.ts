/** When the head of a record is signed and time-stamped, in the order of a study's life. */
export const moments = ['sealing', 'draw-fixed', 'session-end', 'closing', 'publication'] as const;
export type Moment = (typeof moments)[number];

/** The moments in words. */
export const momentWords: Record<Moment, string> = {
  sealing: 'Protocol sealed',
  'draw-fixed': 'Contributions fixed',
  'session-end': 'Session ended',
  closing: 'Study closed',
  publication: 'Published',
};

// Contributions are fixed for good with `draw-fixed`: only then is it known which of the listed ones were dropped. A
// study is closed with its result, the last of the entries that closing writes.
const momentOfKind: Readonly<Record<string, Moment>> = {
  'protocol-sealed': 'sealing',
  'protocol-amended': 'sealing',
  'draw-fixed': 'draw-fixed',
  'session-finished': 'session-end',
  'session-abandoned': 'session-end',
  'result-recorded': 'closing',
  'study-published': 'publication',
};

/** The moment that an entry of this kind marks, or null. */
export function momentOf(kind: string): Moment | null {
  return Object.hasOwn(momentOfKind, kind) ? (momentOfKind[kind] ?? null) : null;
}
