import { In } from 'typeorm';
import type { SessionListQuery } from '#shared/contracts/sessions.ts';
import { likePattern, pageOfRows, sortRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { Study } from '../studies/study.entity.ts';
import { Answer } from './answer.entity.ts';
import { Remark } from './remark.entity.ts';
import { Seat } from './seat.entity.ts';
import { Session } from './session.entity.ts';

export function listSessions(tx: Tx, organisationId: string, query: SessionListQuery & { proctorId?: string }) {
  const rows = tx
    .createQueryBuilder(Session, 'session')
    .innerJoin(Study, 'study', 'study.id = session.studyId')
    .addSelect('study.title')
    .where('session.organisationId = :organisationId', { organisationId });
  if (query.proctorId !== undefined) rows.andWhere('session.proctorId = :proctorId', { proctorId: query.proctorId });
  if (query.studyId !== undefined) rows.andWhere('session.studyId = :studyId', { studyId: query.studyId });
  const ended = ['finished', 'abandoned'];
  if (query.phase === 'ended') rows.andWhere('session.phase in (:...ended)', { ended });
  if (query.phase === 'open') rows.andWhere('session.phase not in (:...ended)', { ended });
  if (query.q !== '') rows.andWhere('(session.room like :q or study.title like :q)', { q: likePattern(query.q) });
  const columns = {
    title: 'study.title',
    number: 'session.number',
    phase: 'session.phase',
    plannedAt: 'session.plannedAt',
    room: 'session.room',
  };
  return pageOfRows(sortRows(rows, query.sort, columns, 'session.id'), query.page);
}

export function findSession(tx: Tx, organisationId: string, id: string): Promise<Session | null> {
  return tx.findOneBy(Session, { organisationId, id });
}

export function sessionById(tx: Tx, id: string): Promise<Session | null> {
  return tx.findOneBy(Session, { id });
}

export function sessionByCode(tx: Tx, code: string): Promise<Session | null> {
  return tx.findOneBy(Session, { code });
}

export function sessionsOfStudy(tx: Tx, studyId: string): Promise<Session[]> {
  return tx.find(Session, { where: { studyId }, order: { number: 'ASC' } });
}

export function sessionsOfStudies(tx: Tx, studyIds: readonly string[]): Promise<Session[]> {
  return studyIds.length === 0 ? Promise.resolve([]) : tx.find(Session, { where: { studyId: In([...studyIds]) } });
}

/** Sessions in which something may be due: those that were open when the server last stopped. */
export function openSessions(tx: Tx): Promise<Session[]> {
  return tx.findBy(Session, { phase: In(['seating', 'revealing', 'running']) });
}

export async function insertSession(tx: Tx, session: Session) {
  await tx.insert(Session, session);
}

export async function updateSession(tx: Tx, id: string, change: Partial<Session>) {
  await tx.update(Session, { id }, change);
}

export async function codeIsTaken(tx: Tx, code: string): Promise<boolean> {
  return tx.existsBy(Session, { code });
}

export function seatsOf(tx: Tx, sessionId: string): Promise<Seat[]> {
  return tx.find(Seat, { where: { sessionId }, order: { label: 'ASC' } });
}

export function seatByToken(tx: Tx, tokenDigest: string): Promise<Seat | null> {
  return tx.findOneBy(Seat, { tokenDigest });
}

/** The label that the study's next new listener gets. A returning listener has one label in several sessions. */
export async function nextLabel(tx: Tx, studyId: string): Promise<string> {
  const seats = await tx.find(Seat, { where: { studyId }, select: { label: true } });
  return `L${String(new Set(seats.map(({ label }) => label)).size + 1).padStart(2, '0')}`;
}

export function lockSession(tx: Tx, organisationId: string, id: string): Promise<Session | null> {
  return tx.findOne(Session, { where: { organisationId, id }, lock: { mode: 'pessimistic_write' } });
}

export async function insertSeat(tx: Tx, seat: Seat) {
  await tx.insert(Seat, seat);
}

export function answersToTrial(tx: Tx, sessionId: string, trial: number): Promise<Answer[]> {
  return tx.findBy(Answer, { sessionId, trial, late: false });
}

export function answersOfSessions(tx: Tx, sessionIds: readonly string[]): Promise<Answer[]> {
  return sessionIds.length === 0
    ? Promise.resolve([])
    : tx.find(Answer, { where: { sessionId: In([...sessionIds]), late: false }, order: { trial: 'ASC', seat: 'ASC' } });
}

/** Stores an answer, or its latest change. */
export async function saveAnswer(tx: Tx, answer: Answer) {
  await tx.upsert(Answer, answer, ['sessionId', 'trial', 'seat', 'late']);
}

/** Stores what a listener said beside the trials; a repeat of it is the same row. */
export async function saveRemark(tx: Tx, remark: Remark) {
  await tx.upsert(Remark, remark, ['sessionId', 'seat', 'about']);
}

export function remarksOfSessions(tx: Tx, sessionIds: readonly string[]): Promise<Remark[]> {
  return sessionIds.length === 0
    ? Promise.resolve([])
    : tx.find(Remark, { where: { sessionId: In([...sessionIds]) }, order: { about: 'ASC', seat: 'ASC' } });
}
