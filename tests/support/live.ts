import { createHash } from 'node:crypto';
import { io, type Socket } from 'socket.io-client';
import request from 'supertest';
import type { HeldAnswer, ListenerView } from '#shared/contracts/listener-live.ts';
import type { Acknowledgement } from '#shared/contracts/live.ts';
import { cautions, type ProctorView } from '#shared/contracts/proctor-live.ts';
import { contributionCommitment } from '#shared/session/answer-leaf.ts';
import { password } from './people.ts';
import { until } from './until.ts';

const hexOf = (text: string, bytes: number) =>
  createHash('sha256')
    .update(text)
    .digest('hex')
    .slice(0, bytes * 2);

/** A page with a live socket: its latest view, and every byte that came in. */
export class LivePage<View> {
  view: View | null = null;
  readonly received: string[] = [];
  readonly socket: Socket;

  constructor(address: string, auth: object, cookie?: string) {
    const extraHeaders: Record<string, string> = cookie === undefined ? {} : { cookie };
    this.socket = io(address, {
      auth,
      extraHeaders,
      transports: ['websocket'],
      forceNew: true,
      reconnectionDelay: 50,
      reconnectionDelayMax: 100,
    });
    this.socket.on('view', (view: View) => {
      this.view = view;
    });
    const listen = () => {
      this.socket.io.engine.on('packet', ({ type, data }) => {
        if (type === 'message' && typeof data === 'string' && /^[23]/.test(data)) this.received.push(data);
      });
    };
    this.socket.io.on('open', listen);
  }

  send(command: object): Promise<Acknowledgement> {
    return this.socket.timeout(5_000).emitWithAck('command', command);
  }

  /** Sends and expects success. */
  async ask(command: object): Promise<Extract<Acknowledgement, { ok: true }>> {
    const answer = await this.send(command);
    if (!answer.ok) throw new Error(`refused: ${answer.problem.type} ${answer.problem.detail}`);
    return answer;
  }

  sees(what: string, look: (view: View) => unknown): Promise<View> {
    return until(what, () => (this.view !== null && look(this.view) ? this.view : null));
  }

  close(): void {
    this.socket.close();
  }
}

export async function cookieOf(address: string, email: string): Promise<string> {
  const reply = await request(address).post('/api/sign-in').send({ email, password }).expect(200);
  return String(reply.headers['set-cookie']?.[0]).split(';')[0] ?? '';
}

export class Console extends LivePage<ProctorView> {
  static async open(address: string, email: string, sessionId: string): Promise<Console> {
    const page = new Console(address, { audience: 'proctor', sessionId }, await cookieOf(address, email));
    await page.sees('a first view', () => true);
    return page;
  }

  get now(): ProctorView {
    if (this.view === null) throw new Error('no view yet');
    return this.view;
  }

  /** A command on the view as it stands; waits until the console shows what came of it. */
  async act(command: { kind: string; [field: string]: unknown }): Promise<void> {
    const before = this.now.version;
    await this.ask({ ...command, expectVersion: before });
    await this.sees(`${command.kind} done`, (view) => view.version > before);
  }

  async openSeating(): Promise<string> {
    await this.act({ kind: 'confirm-cautions', items: [...cautions] });
    await this.act({ kind: 'open-seating' });
    return until('a session code', () => this.now.join?.code);
  }
}

export class Phone extends LivePage<ListenerView> {
  readonly token: string;
  readonly seat: string;
  readonly contribution: string;
  #revision = 0;

  constructor(address: string, taken: { token: string; seat: string }, contribution: string) {
    super(address, { audience: 'listener', token: taken.token });
    this.token = taken.token;
    this.seat = taken.seat;
    this.contribution = contribution;
  }

  static async join(address: string, code: string, name: string): Promise<Phone> {
    const contribution = hexOf(`contribution ${name}`, 32);
    const body = {
      code,
      place: name,
      adult: true,
      agreed: true,
      consentVersion: 1,
      commitment: contributionCommitment(contribution),
    };
    const reply = await request(address).post('/api/seats').send(body).expect(200);
    const phone = new Phone(address, reply.body, contribution);
    await phone.sees('a first view', () => true);
    return phone;
  }

  /** Takes the seat of a personal link, or finds it again. */
  static async joinByLink(address: string, link: string, name: string): Promise<Phone> {
    const contribution = hexOf(`contribution ${name}`, 32);
    const commitment = contributionCommitment(contribution);
    const body = { token: link, place: name, adult: true, agreed: true, consentVersion: 2, commitment };
    const reply = await request(address).post('/api/personal-link/seat').send(body).expect(200);
    const phone = new Phone(address, reply.body, contribution);
    await phone.sees('a first view', () => true);
    return phone;
  }

  reveal(): Promise<unknown> {
    return this.ask({ kind: 'reveal', value: this.contribution });
  }

  sayFatigue(number: number, fatigue: string): Promise<unknown> {
    return this.ask({ kind: 'fatigue', salt: hexOf(`fatigue ${this.seat} ${number}`, 16), break: number, fatigue });
  }

  get exitSalt(): string {
    return hexOf(`exit ${this.seat}`, 16);
  }

  /** The exit questions, those not given left empty. */
  sayAtExit(answers: object): Promise<unknown> {
    const empty = { wentBy: '', noticed: null, what: '', guesses: [] };
    return this.ask({ kind: 'exit', salt: this.exitSalt, answers: { ...empty, ...answers } });
  }

  /** The answer as a command; the same trial and choice always have the same salt. */
  answerCommand(trial: number, choice: string, revision: number) {
    const salt = hexOf(`salt ${this.seat} ${trial} ${revision}`, 16);
    return { kind: 'answer', trial, choice, confidence: null, revision, salt };
  }

  /** On request; the same place and label always have the same salt. */
  requestCommand(trial: number, presentation: number, label: string) {
    const salt = hexOf(`request ${trial} ${presentation} ${label}`, 16);
    return { kind: 'request-presentation', trial, presentation, label, salt };
  }

  async answer(trial: number, choice: string): Promise<HeldAnswer> {
    this.#revision += 1;
    const { held } = await this.ask(this.answerCommand(trial, choice, this.#revision));
    if (held === undefined) throw new Error('an answer without its receipt');
    return held;
  }
}
