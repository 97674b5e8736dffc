import type { HandClock } from '../../server/demo/hand-clock.ts';
import type { Console, Phone } from './live.ts';

/** What is done at the step for scanning, with the code to be fitted. */
export type Scan = (desk: Console, code: string) => Promise<void>;

/** Both ends, by what a person types. */
export const scanBothEnds: Scan = async (desk, code) => {
  for (let end = 1; end <= 2; end += 1) await desk.act({ kind: 'scan-label', text: code, by: 'typed' });
};

/** One presentation: every step of the change, its registered time, the excerpt. Returns the code that was fitted. */
export async function present(desk: Console, clock: HandClock, scan: Scan = scanBothEnds): Promise<string> {
  const { trial } = await desk.sees('a change', (view) => view.trial?.stage === 'change');
  const presentation = trial?.presentationNumber;
  const last = desk.now.steps.length - 1;
  for (const [index, { kind }] of desk.now.steps.entries()) {
    const opensAt = index === last ? desk.now.trial?.endsAt : desk.now.trial?.stepEndsAt;
    clock.advance(Math.max(0, (opensAt ?? 0) - clock.now()));
    if (kind === 'scan') await scan(desk, desk.now.trial?.code ?? '');
    else await desk.act({ kind: 'confirm-step', step: kind });
  }
  const code = desk.now.trial?.code ?? '';
  clock.advance((desk.now.trial?.endsAt ?? 0) - clock.now());
  await desk.sees(
    'the end of the excerpt',
    ({ trial: now }) =>
      now === null || now.stage === 'answering' || now.stage === 'asking' || now.presentationNumber !== presentation,
  );
  return code;
}

/** Seating closed, randomness revealed, familiarisation over. */
export async function begin(
  desk: Console,
  phones: readonly Phone[],
  clock: HandClock,
  scan: Scan = scanBothEnds,
): Promise<void> {
  await desk.act({ kind: 'close-seating' });
  for (const phone of phones) await phone.reveal();
  await desk.sees('the draw fixed', (view) => view.phase === 'running');
  await desk.act({ kind: 'begin-familiarisation' });
  await present(desk, clock, scan);
  await present(desk, clock, scan);
  await desk.sees('the familiarisation over', (view) => view.familiarised);
}

/** A trial up to its question. Returns the codes fitted, presentation by presentation. */
export async function presentTrial(desk: Console, clock: HandClock, scan: Scan = scanBothEnds): Promise<string[]> {
  await desk.act({ kind: 'begin-trial' });
  return presentOpen(desk, clock, scan);
}

/** The presentations of a trial that has just been opened. */
export async function presentOpen(desk: Console, clock: HandClock, scan: Scan = scanBothEnds): Promise<string[]> {
  const codes: string[] = [];
  for (let count = desk.now.trial?.presentations ?? 0; count > 0; count -= 1)
    codes.push(await present(desk, clock, scan));
  return codes;
}
