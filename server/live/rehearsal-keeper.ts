import { type Entry, nextEntry } from '#shared/ledger/chain.ts';
import { Problem } from '#shared/problem.ts';
import { leastSeparate } from '#shared/protocol/ways-to-run.ts';
import { drawSecretCommitment } from '#shared/session/commitments.ts';
import { contributionsOf } from '#shared/session/counted-trials.ts';
import type { SessionPlan } from '#shared/session/events.ts';
import { codeFitted, truthOfPractice } from '#shared/session/fitting.ts';
import { presentationNow } from '#shared/session/progress.ts';
import { firstCheckCable } from '#shared/session/trial-kinds.ts';
import { drawCodes } from '../blind/index.ts';
import type { Random } from '../deps.ts';
import type { Keeper, Keeping } from './keeper.ts';

/** A rehearsal's invented codes: as few specimens of every cable as its plan needs, and nothing behind them. */
function inventedKey(random: Random, { checks, separateSpecimens }: SessionPlan) {
  const ofEach = separateSpecimens ? leastSeparate : 1;
  const cables = firstCheckCable + (checks?.steps.length ?? 0);
  return drawCodes(random, cables * ofEach).map((code, index) => ({
    code,
    specimen: '',
    serial: '',
    cable: index % cables,
  }));
}

/** Keeps a rehearsal in memory alone: invented codes, a draw of its own, and no record. */
export function rehearsalKeeper(random: Random, code: string, plan: SessionPlan): Keeper {
  const rows = inventedKey(random, plan);
  const secret = random.bytes('draw-secret', 32).toString('hex');
  let head: Entry | null = null;
  let seats = 0;
  const keeping: Keeping = {
    openSeating: async ({ state }) => {
      if (state.phase !== 'planned') throw new Problem('wrong-phase', 'Seating is open already.');
      return { commitment: drawSecretCommitment(random.bytes('draw-salt', 32).toString('hex'), secret), code };
    },
    addSeat: async (seat) => {
      seats += 1;
      return { ...seat, label: `L${String(seats).padStart(2, '0')}` };
    },
    // The memory holds the open trial's answers and requests, and nothing else asks for them.
    saveAnswer: async () => {},
    saveRemark: async () => {},
    saveRequest: async () => {},
    record: async ({ session }, events) =>
      events.map(({ kind, at, payload }) => {
        const nonce = random.bytes('entry-nonce', 16).toString('hex');
        head = nextEntry(head, {
          study: session.studyId,
          at: new Date(at).toISOString(),
          kind,
          version: 1,
          payload,
          nonce,
        });
        return head;
      }),
  };
  return {
    keep: (work) => work(keeping),
    codes: async () => rows.map(({ code }) => code).sort(),
    titleOfMark: async () => null,
    codeToFit: async ({ state, method }) => {
      const presentation = presentationNow(state, method);
      if (presentation === null || state.trial === null) return null;
      return codeFitted({
        secret,
        rows,
        contributions: contributionsOf(state),
        method,
        state,
        trial: state.trial.trial,
        practice: state.trial.practice,
        presentation,
      });
    },
    truthPractised: async ({ state, method }, practice) =>
      truthOfPractice({ secret, rows, contributions: contributionsOf(state), method, plan: state.plan }, practice),
  };
}
