import { EmptyState } from '../../../ui/empty-state.tsx';
import { LinkButton } from '../../../ui/link-button.tsx';

type FirstStudyProps = {
  /** Cables that a study could choose from. */
  cableCount: number;
  newCableTo: string;
  newStudyTo: string;
};

/** Stands where the studies will be. A study compares two cables, so those come first. */
export function FirstStudy({ cableCount, newCableTo, newStudyTo }: FirstStudyProps) {
  if (cableCount >= 2)
    return (
      <EmptyState
        title="Your studies will be here."
        action={
          <LinkButton variant="primary" to={newStudyTo}>
            Plan the first study
          </LinkButton>
        }
      >
        A study asks one question about two cables. While you plan it you see how much listening it needs and what it
        could find.
      </EmptyState>
    );
  return (
    <EmptyState
      title="First come two cables."
      action={
        <LinkButton variant="primary" to={newCableTo}>
          {cableCount === 0 ? 'Add the first cable' : 'Add the second cable'}
        </LinkButton>
      }
    >
      A study compares two cables, each with at least one specimen.{' '}
      {cableCount === 0 ? 'There is none yet.' : 'There is one so far.'}
    </EmptyState>
  );
}
