import { useEffect } from 'react';
import { useBlocker } from 'react-router-dom';
import { ConfirmDialog } from './confirm-dialog.tsx';

type LeaveGuardProps = {
  /** Read at the moment of leaving; one guard per page. */
  isUnsaved: () => boolean;
};

/** Asks once before what was typed is lost, whichever way the page is left: links, history, closing, reloading. */
export function LeaveGuard({ isUnsaved }: LeaveGuardProps) {
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) => currentLocation.pathname !== nextLocation.pathname && isUnsaved(),
  );
  useEffect(() => {
    const warn = (event: BeforeUnloadEvent) => {
      if (isUnsaved()) event.preventDefault();
    };
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [isUnsaved]);
  return (
    <ConfirmDialog
      isOpen={blocker.state === 'blocked'}
      onOpenChange={() => blocker.reset?.()}
      title="Leave without saving?"
      consequence="What you typed on this page has not been saved and would be lost."
      confirmWord="Leave and lose it"
      keepWord="Keep editing"
      onConfirm={() => blocker.proceed?.()}
    />
  );
}
