import type { Report } from '#shared/contracts/reports.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from './live.ts';
import { readyStudy, type TestOrganisation } from './people.ts';
import { begin, presentTrial } from './run-session.ts';
import type { TestServer } from './test-server.ts';

/** What each seat heard and answered in one trial; null for silence. */
export type Heard = { codes: string[]; choices: (string | null)[] };

/** A study of any method from its seal to its report, by simulated phones: 8 trials, whatever the method. */
export async function runMethod(
  server: TestServer,
  people: TestOrganisation,
  clock: HandClock,
  asked: {
    study: Partial<StudyDraft>;
    seats: readonly string[];
    choose: (codes: string[], seat: number, trial: number) => string | null;
    /** An answer that the method does not have. */
    impossible: string;
  },
) {
  const study = await readyStudy(server, people, {
    ...asked.study,
    listenersPerSession: asked.seats.length,
    trials: 8,
    spares: 1,
  });
  const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
  const code = await desk.openSeating();
  const phones: Phone[] = [];
  for (const name of asked.seats) phones.push(await Phone.join(server.address, code, name));
  await begin(desk, phones, clock);
  const heard: Heard[] = [];
  for (let trial = 1; trial <= 8; trial += 1) {
    const codes = await presentTrial(desk, clock);
    const choices = phones.map((_, seat) => asked.choose(codes, seat, trial));
    for (const [seat, phone] of phones.entries()) {
      const choice = choices[seat];
      if (choice !== null && choice !== undefined) await phone.answer(trial, choice);
    }
    const given = choices.filter((choice) => choice !== null).length;
    await desk.sees('the answers', (view) => view.trial?.answered === given);
    if (given === phones.length) await desk.act({ kind: 'lock-trial' });
    else clock.advance(20_000);
    await desk.sees('the lock', (view) => view.trial === null);
    heard.push({ codes, choices });
  }
  const refused = await phones[0]?.send(phones[0].answerCommand(8, asked.impossible, 9));
  await desk.act({ kind: 'finish' });
  await phones[0]?.sees('the end', (view) => view.phase === 'finished');
  await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
  const report: Report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
  // The holder's sheet is what the room had in its hands: it says which code was which cable, and the report does not.
  const sheet = await study.holder.post(`${study.at}/codes/open`).send({ purpose: 'check' }).expect(200);
  const [firstName] = report.cables;
  const firstCode: string = sheet.body.rows.find(({ cable }: { cable: string }) => cable === firstName).code;
  const view = phones[0]?.view;
  for (const page of [desk, ...phones]) page.close();
  return { report, heard, firstCode, view, refused };
}
