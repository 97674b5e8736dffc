import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { type AmendmentPreview, type StudyDraft, studiesApi } from '#shared/contracts/studies.ts';
import { formatCount } from '../../../lib/format.ts';
import { showProblem } from '../../../lib/show-problem.ts';
import { Button } from '../../../ui/button.tsx';
import { ChangeList } from '../../../ui/change-list.tsx';
import { Form } from '../../../ui/form.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { TextAreaField } from '../../../ui/text-area-field.tsx';
import { useAmendStudy } from '../studies.queries.ts';

/** The contract has a body; its type alone leaves that open. The draft was checked in its own form. */
const reasonOnly = (studiesApi.amend.body as NonNullable<typeof studiesApi.amend.body>).pick({ reason: true });

type SealAmendmentProps = {
  organisationId: string;
  studyId: string;
  draft: StudyDraft;
  preview: AmendmentPreview;
  onBack: () => void;
  onSealed: () => void;
};

/** What the amendment changes and what follows from it; then the reason, and the seal. */
export function SealAmendment({ organisationId, studyId, draft, preview, onBack, onSealed }: SealAmendmentProps) {
  const amend = useAmendStudy(organisationId, studyId);
  const form = useForm({ resolver: zodResolver(reasonOnly), defaultValues: { reason: '' } });
  const { changes, amends } = preview;
  if (changes.length === 0)
    return (
      <div className="flex max-w-3xl flex-col items-start gap-5">
        <Notice title="Nothing differs.">This is the sealed protocol as it is. Change something first.</Notice>
        <Button onClick={onBack}>Back to the form</Button>
      </div>
    );
  return (
    <Form
      form={form}
      className="max-w-3xl"
      aria-label="Amendment"
      onSubmit={async ({ reason }) => {
        try {
          await amend.mutateAsync({ draft, reason, amends });
          onSealed();
        } catch (problem) {
          showProblem(form, problem);
        }
      }}
      actions={
        <div className="flex flex-wrap gap-3">
          <Button type="submit" variant="primary" busy={form.formState.isSubmitting} busyLabel="Sealing">
            Seal version {amends + 1} for good
          </Button>
          <Button onClick={onBack}>Back to the form</Button>
        </div>
      }
    >
      <section aria-labelledby="changes" className="flex flex-col gap-3">
        <h2 id="changes" className="text-xl">
          What version {amends + 1} changes
        </h2>
        <ChangeList label="Changes" changes={changes} />
      </section>
      <section aria-labelledby="follows" className="flex flex-col gap-3">
        <h2 id="follows" className="text-xl">
          What follows
        </h2>
        <ul className="flex list-disc flex-col gap-1 pl-6">
          {followsFrom(preview).map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      </section>
      <TextAreaField
        {...form.register('reason')}
        label="Why the protocol is amended"
        rows={3}
        hint="It goes on the record and is published with it. Name no person."
      />
    </Form>
  );
}

const codesWords: Record<AmendmentPreview['codes'], string> = {
  none: 'No codes are drawn yet; they will be drawn for the new version.',
  kept: 'The blind codes stay in use: specimens and code holder are the same.',
  void: 'The blind codes are void: specimens or code holder are others. The code holder takes the old sleeves off and draws new codes; no session opens before.',
};

function followsFrom({ amends, codes, sessionsReplanned }: AmendmentPreview): string[] {
  return [
    `Version ${amends} is kept. Every version, its reason and its differences are published with the study.`,
    'The new digest goes on the record and, at once, into the public registry.',
    codesWords[codes],
    sessionsReplanned === 0
      ? 'No session is planned yet.'
      : `${formatCount(sessionsReplanned, 'planned session')} will go by the new version. Listeners who are invited are not told.`,
  ];
}
