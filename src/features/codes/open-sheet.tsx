import type { CodeSheet, CodesStatus } from '#shared/contracts/codes.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { useOpenCodes } from './codes.queries.ts';

type OpenSheetProps = { organisationId: string; status: CodesStatus; onOpened: (sheet: CodeSheet) => void };

/** Says what opening does before it is done; nothing is fetched until then. */
export function OpenSheet({ organisationId, status, onOpened }: OpenSheetProps) {
  const open = useOpenCodes(organisationId, status.studyId);
  const purpose = status.state === 'confirmed' ? 'check' : 'labels';
  return (
    <section aria-labelledby="open-sheet" className="flex max-w-3xl flex-col gap-5 border-t-2 border-ink pt-5">
      <h2 id="open-sheet" className="text-2xl">
        Before you open the sheet
      </h2>
      <ul className="flex list-disc flex-col gap-2 pl-6 text-lg">
        <li>It shows which code is which cable. Be alone, and let nobody see this screen or the printer’s tray.</li>
        <li>Opening it goes on the record: your name, the time, and that it was {purposeText[purpose]}.</li>
        <li>The sheet is forgotten when you leave or reload this page; opening it again is recorded again.</li>
      </ul>
      <div role="alert" className="empty:hidden">
        {open.error ? <Notice tone="amber">{problemText(open.error)}</Notice> : null}
      </div>
      <div>
        <Button
          variant="primary"
          busy={open.isPending}
          busyLabel="Opening"
          onClick={() => open.mutate(purpose, { onSuccess: onOpened })}
        >
          I am alone: open the sheet
        </Button>
      </div>
    </section>
  );
}

const purposeText = { labels: 'opened to print the labels', check: 'opened to check the specimens' };
