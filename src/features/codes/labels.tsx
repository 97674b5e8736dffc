import { useState } from 'react';
import type { CodeSheet, CodesStatus } from '#shared/contracts/codes.ts';
import { Button } from '../../ui/button.tsx';
import { LinkButton } from '../../ui/link-button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { KeyList } from './key-list.tsx';
import { OpenSheet } from './open-sheet.tsx';
import { SleeveLabels } from './sleeve-labels.tsx';

type LabelsProps = { organisationId: string; status: CodesStatus; codesTo: string };

/** The labels to print and the key to keep, held in this page alone and only after it was asked for. */
export function Labels({ organisationId, status, codesTo }: LabelsProps) {
  const [sheet, setSheet] = useState<CodeSheet | null>(null);
  return (
    <>
      <div className="print:hidden">
        <PageHeader
          title="Labels for the sleeves"
          lede={status.title}
          back={{ to: codesTo, label: 'Blind codes' }}
          actions={
            sheet ? (
              <Button variant="primary" onClick={() => window.print()}>
                Print labels and key
              </Button>
            ) : null
          }
        />
      </div>
      {sheet ? (
        <OpenedSheet sheet={sheet} codesTo={codesTo} />
      ) : (
        <BeforeOpening organisationId={organisationId} status={status} onOpened={setSheet} />
      )}
    </>
  );
}

type BeforeOpeningProps = Omit<LabelsProps, 'codesTo'> & { onOpened: (sheet: CodeSheet) => void };

function BeforeOpening({ organisationId, status, onOpened }: BeforeOpeningProps) {
  if (!status.youHoldCodes)
    return (
      <Notice title={`Only ${status.codeHolder} opens the code sheet.`}>
        Which code is which cable is known to the code holder alone until the study is closed.
      </Notice>
    );
  if (status.state === 'none') return <Notice title="No codes yet.">Draw them first; then the labels are here.</Notice>;
  return <OpenSheet organisationId={organisationId} status={status} onOpened={onOpened} />;
}

function OpenedSheet({ sheet, codesTo }: { sheet: CodeSheet; codesTo: string }) {
  return (
    <div className="flex flex-col gap-12 print:block">
      <div className="flex flex-col gap-6">
        <p className="max-w-3xl text-lg print:hidden">
          Two labels for each specimen, one for each end. Print at full size, cut along the marks, and stick them on the
          sleeves with the QR code flat. On paper the key comes on a page of its own: keep it apart from the labels.
        </p>
        <SleeveLabels rows={sheet.rows} mark={sheet.mark} />
      </div>
      <KeyList {...sheet} />
      <div className="print:hidden">
        <LinkButton to={codesTo}>Done, close the sheet</LinkButton>
      </div>
    </div>
  );
}
