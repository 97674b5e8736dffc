import type { CodesStatus } from '#shared/contracts/codes.ts';
import { formatDateTime } from '../../lib/format.ts';
import { Notice } from '../../ui/notice.tsx';
import { CodesFacts } from './codes-facts.tsx';
import { Duty } from './duty.tsx';
import { HolderSteps } from './holder-steps.tsx';
import { Openings } from './openings.tsx';

type CodesOverviewProps = { organisationId: string; status: CodesStatus; labelsTo: string };

/** The code holder's duty, step by step; to anybody else only how far it is. */
export function CodesOverview({ organisationId, status, labelsTo }: CodesOverviewProps) {
  return (
    <div className="flex flex-col gap-10">
      {status.voidedAt === null ? null : (
        <Notice tone="amber" title="The codes drawn before are void." className="max-w-3xl">
          The protocol was amended {formatDateTime(status.voidedAt)}: specimens or code holder are others now. Take the
          old sleeves off and destroy the old labels; codes are drawn anew.
        </Notice>
      )}
      {status.youHoldCodes ? (
        <>
          <HolderSteps organisationId={organisationId} status={status} labelsTo={labelsTo} />
          <Duty />
        </>
      ) : (
        <Notice title={`${status.codeHolder} holds the codes.`} className="max-w-3xl">
          Which code is which cable is known to the code holder alone until the study is closed. Please do not ask.
        </Notice>
      )}
      <CodesFacts status={status} />
      <Openings openings={status.openings} />
    </div>
  );
}
