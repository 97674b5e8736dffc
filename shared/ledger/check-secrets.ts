import { codedCables, type Protocol } from '../protocol/protocol.ts';
import { contributionCommitment } from '../session/answer-leaf.ts';
import { codeKeyCommitment, drawSecretCommitment } from '../session/commitments.ts';
import { revealedDraw } from '../session/counted-trials.ts';
import { revealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import type { PublishedDraw } from './publication-parts.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

const textOf = (value: unknown) => canonicalJson(value as Json);

/** What was revealed at closing is what had been committed to before anybody listened; the phones’ numbers too. */
export function checkCommitments(study: StudyReading): Verdict {
  const secrets = study.secrets();
  const faults: string[] = [];
  const draws = new Map<unknown, (typeof secrets.draws)[number]>(secrets.draws.map((draw) => [draw.session, draw]));
  for (const { payload } of study.entries().filter(({ kind }) => kind === 'seating-opened')) {
    const draw = draws.get(payload.session);
    if (draw === undefined || drawSecretCommitment(draw.salt, draw.secret) !== payload.commitment)
      faults.push(`Session ${payload.session}: the revealed secret is not the one committed to.`);
  }
  for (const { session, seats } of study.sessions())
    for (const { seat, revealed, commitment } of seats)
      if (revealed !== null && contributionCommitment(revealed) !== commitment)
        faults.push(`Session ${session}, ${seat}: the revealed number is not the one committed to.`);
  const recorded = revealedKey.parse(study.payloadOf('key-revealed'));
  if (textOf(secrets.draws) !== textOf(recorded.draws))
    faults.push('The secrets are not those that the record reveals.');
  const phones = study.sessions().flatMap(({ seats }) => seats.filter(({ revealed }) => revealed !== null));
  return {
    faults,
    held: `${secrets.draws.length} session secrets and the numbers of ${phones.length} phones.`,
  };
}

/** Every specimen that is coded, with the place of its cable. */
const specimensIn = (protocol: Protocol) =>
  codedCables(protocol).flatMap(({ specimens }, cable) => specimens.map(({ id }) => [cable, id]));

/** Which code is which specimen was committed to before anybody sat down, and revealed as it was. */
export function checkCodeKey(study: StudyReading): Verdict {
  const { codeKey } = study.secrets();
  const entries = study.entries();
  const committed = entries.filter(({ kind }) => kind === 'code-key-committed').at(-1);
  const faults: string[] = [];
  if (committed?.payload.commitment !== codeKeyCommitment(codeKey.salt, codeKey.rows))
    faults.push('The revealed code key is not the one committed to.');
  const seating = entries.find(({ kind }) => kind === 'seating-opened');
  if (committed !== undefined && seating !== undefined && committed.sequence > seating.sequence)
    faults.push('The code key was committed to after somebody had sat down.');
  if (textOf(codeKey.rows.map(({ specimen, cable }) => [cable, specimen])) !== textOf(specimensIn(study.protocol())))
    faults.push('The code key is not of the specimens that the protocol names.');
  const recorded = revealedKey.parse(study.payloadOf('key-revealed'));
  if (textOf(codeKey) !== textOf(recorded.codeKey)) faults.push('The code key is not the one that the record reveals.');
  const of = codeKey.rows.length;
  return { faults, held: `${of} codes, committed to with entry ${committed?.sequence} before anybody sat down.` };
}

/** Every draw follows from the committed secret and the phones’ numbers in the order that the record lists. */
export function checkDraws(study: StudyReading): Verdict {
  const published = study.draws();
  const secrets = study.secrets();
  const faults: string[] = [];
  const recomputed: PublishedDraw[] = [];
  const states = new Map<unknown, SessionState>(study.sessions().map((state) => [state.session, state]));
  const revealed = new Map<unknown, string>(secrets.draws.map(({ session, secret }) => [session, secret]));
  for (const { payload } of study.entries().filter(({ kind }) => kind === 'draw-fixed')) {
    const state = states.get(payload.session);
    const secret = revealed.get(payload.session);
    if (state === undefined || secret === undefined) {
      faults.push(`Session ${payload.session}: there is no secret to draw from.`);
      continue;
    }
    const contributors = state.seats.filter((seat) => seat.contributes && seat.revealed !== null);
    if (textOf(contributors.map(({ seat }) => seat)) !== textOf(payload.contributors ?? null))
      faults.push(`Session ${state.session}: the draw was not fixed with the phones that the record lists.`);
    const draw = revealedDraw(state, study.method(), secret, secrets.codeKey.rows);
    recomputed.push({ session: state.session, ...draw });
  }
  recomputed.sort((a, b) => a.session - b.session);
  const listed = new Map(published.map((draw) => [draw.session, draw]));
  for (const draw of recomputed) {
    const shown = listed.get(draw.session);
    if (shown === undefined || textOf(shown) !== textOf(draw))
      faults.push(`Session ${draw.session}: the draw does not follow from its secrets.`);
  }
  if (textOf(published) !== textOf(recomputed)) faults.push('The listed draws are not those that the record fixes.');
  const trials = recomputed.reduce((sum, { truths }) => sum + truths.length, 0);
  return { faults, held: `${trials} trials in ${recomputed.length} sessions drawn again, spares included.` };
}
