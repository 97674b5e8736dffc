import { useState } from 'react';
import type { AttendanceRow } from '#shared/contracts/attendances.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { Menu, MenuItem, MenuSeparator } from '../../ui/menu.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useAttendanceAct } from './attendances.queries.ts';

type AttendanceChangeProps = {
  organisationId: string;
  attendance: AttendanceRow;
  /** Invitations change until seating opens; an address can be erased at any time. */
  isPlanned: boolean;
};

const questions = {
  withdraw: {
    title: 'Withdraw this invitation?',
    consequence: (email: string) =>
      `The link that ${email} was sent ends at once, and they are told. Whoever waits longest gets the seat.`,
    confirmWord: 'Withdraw',
  },
  erase: {
    title: 'Erase this address?',
    consequence: (email: string) =>
      `${email} is erased from the whole study and from its mail, and every link of theirs ends. What they answered stays under the label. If you invite the address again, it is a new listener under a new label: do so only if you must. This cannot be undone.`,
    confirmWord: 'Erase the address',
  },
};

/** What can be done about one invitation; what ends something is asked once. */
export function AttendanceChange({ organisationId, attendance, isPlanned }: AttendanceChangeProps) {
  const [asked, setAsked] = useState<keyof typeof questions | null>(null);
  const act = useAttendanceAct(organisationId, attendance.id);
  const showToast = useToast();
  const { email, state } = attendance;
  if (email === null) return null;
  const canSend = isPlanned && state !== 'declined' && state !== 'withdrawn';
  const canWithdraw = isPlanned && state !== 'withdrawn';

  function sendAgain() {
    act.mutate('sendAgain', {
      onSuccess: () => showToast(`${email} gets the invitation once more.`, 'held'),
      onError: (error) => showToast(problemText(error), 'amber'),
    });
  }

  return (
    <>
      {act.isPending && asked === null ? (
        <Button busy={true} busyLabel="Sending">
          Change
        </Button>
      ) : (
        <Menu label="Change" of={email}>
          {canSend ? <MenuItem onSelect={sendAgain}>Send it once more</MenuItem> : null}
          {canWithdraw ? <MenuItem onSelect={() => setAsked('withdraw')}>Withdraw …</MenuItem> : null}
          {canWithdraw ? <MenuSeparator /> : null}
          <MenuItem onSelect={() => setAsked('erase')}>Erase the address …</MenuItem>
        </Menu>
      )}
      <ConfirmDialog
        isOpen={asked !== null}
        onOpenChange={(next) => {
          act.reset();
          if (!next) setAsked(null);
        }}
        title={asked === null ? '' : questions[asked].title}
        consequence={asked === null ? '' : questions[asked].consequence(email)}
        confirmWord={asked === null ? '' : questions[asked].confirmWord}
        keepWord="Keep it"
        busy={act.isPending}
        {...(act.error === null ? {} : { problem: problemText(act.error) })}
        onConfirm={() => asked !== null && act.mutate(asked, { onSuccess: () => setAsked(null) })}
      />
    </>
  );
}
