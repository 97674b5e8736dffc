import { notShown, type Publication } from '#shared/contracts/publications.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { gapWords, localTimeWords, type SignedHead } from '#shared/contracts/signed-heads.ts';
import { countsOf, habitsWords, heardWords, pOfStep, secondWords } from '#shared/findings/check-report-words.ts';
import { momentWords } from '#shared/ledger/moments.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { dbText, exactDbText, handlingWords as levelHandlingWords } from '#shared/levels/level-words.ts';
import { levelCheckWords } from '#shared/levels/measured-levels.ts';
import { methodOf } from '#shared/methods/methods.ts';
import type { Portrait } from '#shared/methods/portrait.ts';
import { decibels } from '#shared/protocol/protocol-checks.ts';
import { handlingWords } from '#shared/session/handling.ts';
import { type Html, html } from './html.ts';
import { count, facts, frame, list, section, table, utc } from './page-parts.ts';

const portraitOf = ({ result, cables }: Report): Portrait => methodOf(result.method).portray(result, cables);

function head({ headline, withdrawn, report, title }: Publication): Html {
  const { result, finding, question, flow, conditions } = report;
  const portrait = portraitOf(report);
  return html`<div class="flex flex-col gap-5">
    ${
      withdrawn === null
        ? null
        : html`<p class="max-w-3xl border-l-[5px] border-stop py-1 pl-4"><strong>Withdrawn ${utc(withdrawn.at)}.</strong> ${withdrawn.reason} Nothing may be claimed on it any more. The page stays.</p>`
    }
    <h1 class="max-w-3xl text-3xl">${headline}</h1>
    <p class="max-w-3xl text-lg text-soft">${count(result.answers, 'answer')} due in ${count(result.trials, 'trial')} by ${count(result.listeners, 'listener')} in ${count(result.sessions, 'session')}; ${count(flow.trialsVoid, 'trial')} void. Registered before the first trial.</p>
    <ul class="flex max-w-3xl flex-col gap-2">${[...finding.modifiers, ...conditions].map((line) => html`<li class="border-l-[5px] border-edge pl-4">${line}</li>`)}</ul>
    <p class="max-w-3xl"><strong>${title}.</strong> <span class="text-soft">${question}</span></p>
    <div class="flex flex-col gap-1 border-t-2 border-b border-t-ink border-b-rule py-5">
      ${portrait.figures.map(
        ({ value, label }, index) =>
          html`<p><span class="${index === 0 ? 'font-mono text-figure font-semibold tracking-tight text-copper' : 'font-mono text-xl font-semibold'}">${value}</span> <span class="text-soft">${label}</span></p>`,
      )}
      <p class="text-soft">Registered level ${result.alpha}; exact p = ${result.p.numerator} / ${result.p.denominator}.</p>
      <p>${portrait.note}</p>
    </div>
  </div>`;
}

function claims({ report: { finding }, withdrawn }: Publication): Html {
  const may =
    finding.maySay === null || withdrawn !== null
      ? html`<p>Nothing: ${withdrawn === null ? 'these numbers support no claim' : 'the publication is withdrawn'}.</p>`
      : html`<blockquote class="max-w-[38em] rounded border border-rule bg-sheet px-5 py-5 font-serif text-xl">${finding.maySay}</blockquote>`;
  return section(
    'What may be said',
    html`${may}<p class="max-w-3xl text-soft">${finding.scope}</p><h3 class="text-lg">What may not be said</h3>${list(finding.mustNotSay, '')}`,
  );
}

function flow({ flow: of, result }: Report): Html {
  return table(
    'From plan to count',
    ['What', 'Count'],
    [
      ['Sessions planned', of.sessionsPlanned],
      ['Sessions opened', of.sessionsOpened],
      ['Sessions finished', of.sessionsFinished],
      ['Sessions abandoned', of.sessionsAbandoned],
      ['Sessions never started', of.sessionsNeverStarted],
      ['Trials opened', of.trialsOpened],
      ['Trials void', of.trialsVoid],
      ['Trials counted', of.trialsCounted],
      ...(of.trialsChecked === 0 ? [] : [['Check trials, reported apart', of.trialsChecked] as [string, number]]),
      ['Answers due', of.answersExpected],
      [`Answers missing, ${result.missingAnswers}`, of.answersMissing],
      ['Listeners', of.listeners],
      ['Listeners who left', of.listenersLeft],
      ['Listeners who joined by code alone', of.listenersUnlinked],
    ],
  );
}

function levels({ handling, toleranceMilliDb, checks: taken }: NonNullable<Report['levels']>): Html {
  const rows = taken.map(({ session: number, check, isIn, differenceMilliDb, driftMilliDb, instrument }) => [
    `Session ${number}, ${levelCheckWords[check]}`,
    isIn ? 'in' : 'out',
    exactDbText(differenceMilliDb),
    driftMilliDb === null ? '' : exactDbText(driftMilliDb),
    instrument.name,
  ]);
  return html`<p class="max-w-3xl">Registered as ${levelHandlingWords[handling]}, tolerance ${dbText(toleranceMilliDb)} between any two codes at 1 kHz. Every reading is in the bundle’s levels.csv.</p>
    ${table('Level match by session', ['Measured', 'Levels', 'Largest difference, dB', 'Moved since the start, dB', 'Instrument'], rows)}`;
}

function listeners(report: Report): Html {
  const { columns, rows } = portraitOf(report).listeners;
  return table(
    'By listener',
    ['Listener', ...columns.map(({ header }) => header)],
    rows.map(({ listener, cells }) => [listener, ...cells]),
  );
}

function known({ knownDifferences, result }: Report): Html {
  if (knownDifferences === null) return html``;
  const { steps, same, sensitiveTo } = knownDifferences;
  return html`${steps.length === 0 ? null : html`<p class="max-w-3xl">${sensitiveTo === null ? 'The largest step was not heard.' : `Sensitive to ${decibels(sensitiveTo)}, in this set-up.`} Check trials stood among the others and are no part of the result.</p>`}
    ${
      steps.length === 0
        ? null
        : table(
            'Steps, each at the registered level, from the largest down',
            ['Step', 'Trials', 'Answers', 'Exact p', 'Heard'],
            steps.map((step) => [decibels(step.milliDb), step.trials, countsOf(step), pOfStep(step), heardWords(step)]),
          )
    }
    ${list([habitsWords(same, methodOf(result.method)), ...secondWords(knownDifferences)], '')}`;
}

function excerpts({ byExcerpt }: Report): Html {
  return table(
    'Exploratory: counts alone, no test',
    ['Excerpt', 'Trials', ...(byExcerpt[0]?.rates.map(({ label }) => label) ?? [])],
    byExcerpt.map(({ title, trials, rates }) => [
      title,
      trials,
      ...rates.map(({ counted, due }) => `${counted} of ${due}`),
    ]),
  );
}

function checks(report: Report): Html {
  return table(
    'Checks of the answers',
    ['Check', 'Adjusted p', 'Found'],
    portraitOf(report).checks.map(({ name, tail, words }) => [name, tail, words]),
  );
}

function cueAudit({ cueAudit: { summary, found, rows } }: Report): Html {
  return html`<p class="max-w-3xl">${summary}</p>
    ${
      found.length === 0
        ? null
        : list(
            found.map(({ words }) => words),
            '',
          )
    }
    ${table(
      'Every cue',
      ['Cue', 'Tells, adjusted p', 'Followed, adjusted p', 'Found'],
      rows.map(({ cue, tells, followed, words }) => [cue, tells ?? 'not asked', followed ?? 'not asked', words]),
    )}`;
}

function said({ said: { exits, fatigue } }: Report): Html {
  const lines = exits.map(({ session: number, listener, wentBy, noticed, what, guesses }) => [
    `${listener}, session ${number}`,
    wentBy || '–',
    noticed === null ? '–' : `${noticed}${what === '' ? '' : `: ${what}`}`,
    guesses.map(({ question, text }) => `${question} ${text || '–'}`).join(' '),
  ]);
  return html`${
    lines.length === 0
      ? html`<p class="text-soft">Nobody answered the exit questions.</p>`
      : table('Exit questions', ['Listener', 'Went by', 'Anything but the music', 'Thought they were'], lines)
  }
    ${list(
      fatigue.map((one) => `Session ${one.session}, break ${one.break}, ${one.listener}: ${one.fatigue}`),
      '',
    )}`;
}

function session({
  number,
  phase,
  startedAt,
  endedAt,
  listeners: seated,
  drawn,
  reason,
  handling,
  trials,
}: Report['sessions'][number]): Html {
  const times = `${startedAt === null ? 'never started' : `started ${utc(startedAt)}`}${endedAt === null ? '' : `, ended ${utc(endedAt)}`}`;
  const isAsked = trials.some(({ requested }) => requested !== null);
  const rows = trials.map(({ trial, outcome, excerpt, truth, answers, check, requested }) => [
    check === null ? trial : `${trial}, ${check.name}`,
    outcome === 'locked' ? 'counted' : outcome,
    excerpt,
    truth,
    answers.map(({ listener, choice }) => `${listener} ${choice ?? 'none'}`).join(', '),
    ...(isAsked ? [(requested ?? []).map(({ label, times }) => `${label} ${times}`).join(', ')] : []),
  ]);
  return html`<li class="flex flex-col gap-3 border-t border-rule pt-4">
    <h3 class="text-lg">Session ${number}, ${phase}</h3>
    <p class="text-soft">${count(seated, 'listener')}, ${times}.${drawn === null ? '' : ` ${drawn}`}</p>
    ${handlingWords(handling).map((words) => html`<p class="text-soft">${words}</p>`)}
    ${reason === null ? null : html`<p class="font-semibold">Reason: ${reason}</p>`}
    ${rows.length === 0 ? null : table(`Trials of session ${number}`, ['Trial', 'Outcome', 'Excerpt', 'Drawn', 'Answers', ...(isAsked ? ['Asked for'] : [])], rows)}
  </li>`;
}

function incidents({ voids, missing, deviations }: Report): Html {
  const where = (of: { session: number; trial: number }) => `Session ${of.session}, trial ${of.trial}`;
  return html`<h3 class="text-lg">Void trials</h3>
    ${list(
      voids.map(
        (entry) =>
          `${where(entry)}: ${entry.reason}${entry.note === '' ? '' : `. ${entry.note}`} (${entry.answersHeld} answers held)`,
      ),
      'No trial was set aside.',
    )}
    <h3 class="text-lg">Missing answers</h3>
    ${list(
      missing.map((entry) => `${where(entry)}, ${entry.listener}: ${entry.why}`),
      'Every answer that was due was given.',
    )}
    <h3 class="text-lg">Deviations from the protocol</h3>
    ${list(
      deviations.map(({ at, text }) => `${utc(at)}: ${text}`),
      'None was recorded.',
    )}`;
}

/** What each amendment changed; nothing where there was none. */
function versions(all: Report['protocol']['versions']): Html | null {
  if (all.length < 2) return null;
  return html`<h3 class="text-lg">Its versions</h3>
    <ol class="flex flex-col gap-6">${all.map(
      ({ version, sealedAt, reason, changes }) =>
        html`<li class="flex min-w-0 flex-col gap-2">
          <p><strong>Version ${version}</strong>, sealed ${utc(sealedAt)}, before any session opened.${reason === null ? '' : ` ${reason}`}</p>
          ${
            changes.length === 0
              ? null
              : table(
                  `What version ${version} changed`,
                  ['Line', 'Before', 'After'],
                  changes.map(({ label, before, after }) => [label, before || 'none', after || 'none']),
                )
          }
        </li>`,
    )}</ol>`;
}

function signedHeads(heads: readonly SignedHead[], id: string): Html | null {
  if (heads.length === 0) return null;
  const lines = heads.map(({ moment, session: number, sequence, at, token }) => {
    const which = `${momentWords[moment]}${number === null ? '' : `, session ${number}`}`;
    const stamped =
      token === null
        ? 'waiting for a token'
        : `time-stamped ${utc(token.time)} (${token.isLocal ? 'local' : token.authority}, ${gapWords(token.gapMs)})`;
    return `${which}: entry ${sequence}, signed ${utc(at)}, ${stamped}`;
  });
  const keys = [...new Set(heads.map(({ key }) => key))];
  return html`<h3 class="text-lg">Signed and time-stamped</h3>
    ${list(lines, '')}
    ${heads.some(({ token }) => token?.isLocal) ? html`<p class="max-w-3xl">${localTimeWords}</p>` : null}
    <p><a href="/api/publications/${id}/signed-heads" download="fairlead-signed-heads.json">Download keys, signatures and tokens</a></p>
    ${facts(keys.map((key) => ({ label: 'Fingerprint of the key', value: html`<code>${readableFingerprint(key)}</code>` })))}`;
}

function verification({ id, file, registry, report: { record, protocol } }: Publication): Html {
  return html`<p class="max-w-3xl">With JavaScript this page downloads the record and checks it in your browser, step by step. Without it, download the record and check it with the command “npm run verify”, or by hand as the guide “Check a result” says.</p>
    <p><a href="${file.path}" download>Download the record, ${Math.ceil(file.bytes / 1000)} kB</a></p>
    ${facts([
      { label: 'SHA-256 of the file', value: html`<code>${file.digest}</code>` },
      { label: `Head of the record, entry ${record.entries}`, value: html`<code>${record.head}</code>` },
      { label: `Protocol, sealed ${utc(protocol.sealedAt)}`, value: html`<code>${protocol.digest}</code>` },
    ])}
    <p><a href="${registry}">Every protocol that this publisher has sealed</a></p>
    ${signedHeads(record.heads, id)}
    <h3 class="text-lg">What no software can show</h3>
    <p class="max-w-3xl">${notShown} Repeating the test is the cure.</p>`;
}

/** The whole publication in plain markup, in the order in which the application shows it. */
export function publicationContent(publication: Publication): Html {
  const { report, statements, confirmations, publisher, publishedAt } = publication;
  return frame(
    `Published ${utc(publishedAt)} by ${publisher}`,
    html`<article class="flex flex-col gap-12">
      ${head(publication)}
      ${claims(publication)}
      ${section(
        'Who paid, who supplied, who is tied to whom',
        html`${facts([
          { label: 'Publisher', value: publisher },
          { label: 'Who paid', value: statements.paid },
          { label: 'Who supplied the specimens', value: statements.supplied },
          { label: 'Ties to the maker', value: statements.ties },
        ])}<h3 class="text-lg">The publisher confirms</h3>${list(confirmations, '')}`,
      )}
      ${section('Check it yourself', verification(publication))}
      ${report.levels === null ? null : section('Level at the load', levels(report.levels))}
      ${section('From plan to count', flow(report))}
      ${section('By listener', listeners(report))}
      ${report.knownDifferences === null ? null : section('Known differences', known(report))}
      ${report.byExcerpt.length < 2 ? null : section('By excerpt', excerpts(report))}
      ${section('Checks of the answers', checks(report))}
      ${section('Cue audit', cueAudit(report))}
      ${section('What listeners said', said(report))}
      ${section('Every session', html`<ol class="flex flex-col gap-8">${report.sessions.map(session)}</ol>`)}
      ${section('What did not go as planned', incidents(report))}
      ${section('The sealed protocol', html`${facts(report.protocol.facts)}${versions(report.protocol.versions)}`)}
    </article>`,
  );
}
