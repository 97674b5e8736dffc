import type { CodesStatus } from '#shared/contracts/codes.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { codesStateWords } from './codes-state.ts';

/** How far the codes are: all that anybody but the code holder learns. */
export function CodesFacts({ status }: { status: CodesStatus }) {
  const { word, tone } = codesStateWords[status.state];
  const facts: Fact[] = [
    { label: 'Codes', value: <StatusWord tone={tone}>{word}</StatusWord>, isWords: true },
    {
      label: 'Code holder',
      value: status.youHoldCodes ? `${status.codeHolder} (you)` : status.codeHolder,
      isWords: true,
    },
    { label: 'Specimens', value: status.specimenCount },
  ];
  if (status.commitment !== null)
    facts.push({ label: 'Commitment to the code key, SHA-256', value: status.commitment });
  return (
    <section aria-labelledby="codes-facts" className="flex max-w-3xl flex-col gap-3">
      <h2 id="codes-facts" className="text-xl">
        Where the codes stand
      </h2>
      <Facts facts={facts} />
    </section>
  );
}
