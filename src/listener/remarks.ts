import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { ExitAnswers, RemarkCommand } from '#shared/contracts/remarks.ts';
import { aboutOf, remarkLeaf, saidIn } from '#shared/session/remark-leaf.ts';

/** What this listener said beside the trials, with where it is. */
export type OwnRemark = {
  readonly about: string;
  readonly command: RemarkCommand;
  readonly leaf: string;
  readonly state: 'here' | 'held' | 'refused';
  readonly why: string | null;
};

export const emptyExit: ExitAnswers = { wentBy: '', noticed: null, what: '', guesses: [] };

/** A remark to be sent; its leaf is computed here, as the server computes it. */
export function newRemark(command: RemarkCommand, { sessionId, seat }: ListenerView): OwnRemark {
  const about = aboutOf(command);
  const leaf = remarkLeaf({ salt: command.salt, session: sessionId, seat, about, said: saidIn(command) });
  return { about, command, leaf, state: 'here', why: null };
}

export const withRemark = (remarks: readonly OwnRemark[], remark: OwnRemark): readonly OwnRemark[] => [
  ...remarks.filter(({ about }) => about !== remark.about),
  remark,
];

export const remarkAbout = (remarks: readonly OwnRemark[], about: string): OwnRemark | null =>
  remarks.find((remark) => remark.about === about) ?? null;

export const remarkToSend = (remarks: readonly OwnRemark[]): OwnRemark | null =>
  remarks.find(({ state }) => state === 'here') ?? null;
