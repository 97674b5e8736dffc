import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { cablesApi } from '#shared/contracts/cables.ts';
import { paths } from '../app/paths.ts';
import { useImportCables } from '../features/cables/cables.queries.ts';
import { ImportTrial } from '../features/cables/import-trial.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { addressOf } from '../lib/call.ts';
import { formatCount } from '../lib/format.ts';
import { problemOf } from '../lib/show-problem.ts';
import { FileDrop } from '../ui/file-drop.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

export function Component() {
  const { organisationId } = usePresence().membership;
  const [file, setFile] = useState<File | null>(null);
  const trial = useImportCables(organisationId);
  const adding = useImportCables(organisationId);
  const navigate = useNavigate();
  const showToast = useToast();
  const failure = trial.error ?? adding.error;
  const problem = failure === null ? null : problemOf(failure);

  function take(taken: File) {
    setFile(taken);
    adding.reset();
    trial.mutate({ file: taken, isTrial: true });
  }

  function add() {
    if (file === null) return;
    adding.mutate(
      { file, isTrial: false },
      {
        onSuccess: ({ cables, isAdded }) => {
          if (!isAdded) return trial.mutate({ file, isTrial: true });
          showToast(`${formatCount(cables, 'cable')} added.`, 'held');
          navigate(paths.cables(organisationId));
        },
      },
    );
  }

  return (
    <>
      <PageHeader
        title="Import cables"
        lede="From a table saved as CSV. First you see what would be added; nothing is added until you say so, and then all of it or nothing."
        back={{ to: paths.cables(organisationId), label: 'All cables' }}
        actions={
          <LinkButton to={addressOf(cablesApi.template, { organisationId })} reloadDocument download>
            Download the template
          </LinkButton>
        }
      />
      <div className="flex max-w-3xl flex-col gap-6">
        <FileDrop
          label={file === null ? 'Choose a table' : `Chosen: ${file.name}. Choose another`}
          note="CSV with the headings of the template, at most 2 MB and 5,000 cables. Decimal commas are understood."
          accept=".csv,.txt,.tsv,text/csv,text/plain"
          onFile={take}
        />
        <div role="status" className="flex flex-col gap-4">
          {trial.isPending ? <p>Reading the table …</p> : null}
          {problem === null ? null : (
            <Notice tone="amber" title={problem.message}>
              {problem.errors.map(({ detail }) => detail).join(' ')}
            </Notice>
          )}
          {trial.data === undefined || problem !== null ? null : (
            <ImportTrial found={trial.data} isAdding={adding.isPending} onAdd={add} />
          )}
        </div>
      </div>
    </>
  );
}
