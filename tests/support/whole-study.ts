import type { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from './live.ts';
import { readyStudy, type TestOrganisation } from './people.ts';
import { begin, presentTrial } from './run-session.ts';
import type { TestServer } from './test-server.ts';

/** A study from its seal to its closing, over the API and real sockets: one session, one void, every answer given. */
export async function wholeStudy(server: TestServer, people: TestOrganisation, clock: HandClock, title: string) {
  const study = await readyStudy(server, people, { title, listenersPerSession: 2 });
  const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
  const code = await desk.openSeating();
  const phones = [
    await Phone.join(server.address, code, 'window seat'),
    await Phone.join(server.address, code, 'door seat'),
  ];
  await begin(desk, phones, clock);
  for (let trial = 1; trial <= 6; trial += 1) {
    const [a, , x] = await presentTrial(desk, clock);
    if (trial === 2) {
      await desk.act({ kind: 'void-trial', reason: 'noise', note: 'A lorry <b>passed</b> & hooted.' });
      continue;
    }
    for (const phone of phones) await phone.answer(trial, x === a ? 'A' : 'B');
    await desk.sees('all in', (view) => view.trial?.answered === phones.length);
    await desk.act({ kind: 'lock-trial' });
  }
  await desk.act({ kind: 'finish' });
  for (const page of [desk, ...phones]) page.close();
  await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
  return study;
}
