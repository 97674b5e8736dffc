import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { methods } from '#shared/methods/methods.ts';
import { paths } from '../app/paths.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export function Component() {
  return (
    <div className="max-w-3xl">
      <PageHeader
        title="How Fairlead works"
        lede="Whether people can hear a cable, found out blind, with an answer that anybody can check."
      />
      <div className="flex flex-col gap-10">
        <Section title="A study, step by step">
          <ol className="list-decimal space-y-2 pl-6">
            <li>The manager adds two cables, each with a specimen: the piece that will be fitted.</li>
            <li>The manager plans the study and seals its protocol. From then on nothing in it changes.</li>
            <li>The code holder puts a sleeve with a three-digit blind code on every specimen.</li>
            <li>The manager plans sessions; listeners join the proctor’s session with their phones.</li>
            <li>The proctor fits the code that the screen names. Nobody sees a score, not even a count.</li>
            <li>The manager closes the study. The secrets are opened and the registered analysis runs once.</li>
            <li>
              The manager publishes the result, or shelves the study. A published page checks its record in the
              visitor’s own browser.
            </li>
          </ol>
        </Section>
        <Section title="Who does what">
          <dl className="space-y-3">
            <Term word="Product manager">plans, seals, follows progress, closes, reads the report and publishes.</Term>
            <Term word="Proctor">prepares the room and runs the session, knowing codes but no cables.</Term>
            <Term word="Code holder">is named in a study; alone knows which code is on which cable until closing.</Term>
            <Term word="Reviewer">checks a result without having to trust whoever publishes it.</Term>
            <Term word="Listener">needs no account: a session code or a personal link.</Term>
          </dl>
        </Section>
        <Section title="What listeners are asked">
          <dl className="space-y-3">
            {Object.values(methods).map(({ id, name, explanation }) => (
              <Term key={id} word={`${name}.`}>
                {explanation}
              </Term>
            ))}
          </dl>
        </Section>
        <Section title="How blind a study was">
          <p className="mb-3">
            Nobody ticks it: it follows from the record, and the finding says it. Every step takes in the one before.
          </p>
          <dl className="space-y-3">
            <Term word="Listener-blind:">protocol, codes and draws were sealed before anybody listened.</Term>
            <Term word="Double-blind to the cable:">
              whoever fitted the cables could not know which code was which cable. In ABX they still see whether X bears
              the code of A.
            </Term>
            <Term word="Fully double-blind:">
              what comes again in a trial, such as X, was fitted from separate specimens under codes of its own. Plan
              two specimens of each cable and choose it beside them.
            </Term>
          </dl>
        </Section>
        <Section title="Words you will meet">
          <dl className="space-y-3">
            <Term word="Neutral title">names a study without telling maker, model, material or price.</Term>
            <Term word="Blind code">is three figures on a specimen’s sleeve, drawn for one study.</Term>
            <Term word="Trial">
              is one question to every listener present; was X the same as A or as B, say, or which of two you prefer.
            </Term>
            <Term word="Void">is a trial set aside for a stated fault before it locks; a spare takes its place.</Term>
            <Term word="Record">
              is every step of a study, each entry bound to the one before, so that none can be changed unseen.
            </Term>
          </dl>
        </Section>
        <Section title="Whoever doubts a result">
          <p>
            Every published result can be checked by anybody, without an account:{' '}
            <Link to={paths.verify()}>check a file</Link> that somebody gave you, or open one of the{' '}
            <Link to={paths.publications()}>published results</Link>. Listeners can look up their phone’s receipts
            there.
          </p>
        </Section>
        <div>
          <LinkButton to={paths.start()}>Go to the start</LinkButton>
        </div>
      </div>
    </div>
  );
}

function Section({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="border-t-2 border-ink pt-4">
      <h2 className="pb-3 text-xl">{title}</h2>
      {children}
    </section>
  );
}

function Term({ word, children }: { word: string; children: ReactNode }) {
  return (
    <div>
      <dt className="inline font-semibold">{word}</dt> <dd className="inline">{children}</dd>
    </div>
  );
}
