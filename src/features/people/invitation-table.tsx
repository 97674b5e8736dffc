import { type ReactNode, useState } from 'react';
import type { InvitationRow } from '#shared/contracts/people.ts';
import { formatDateTime } from '../../lib/format.ts';
import { roleWords } from '../../lib/role-words.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { Menu, MenuItem } from '../../ui/menu.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { useToast } from '../../ui/toast.tsx';
import { useInviteAgain, useWithdraw } from './people.queries.ts';

type InvitationTableProps = {
  organisationId: string;
  rows: readonly InvitationRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
};

export function InvitationTable({ organisationId, ...table }: InvitationTableProps) {
  const columns: Column<InvitationRow>[] = [
    {
      key: 'email',
      header: 'Invited',
      isRowHeader: true,
      cell: ({ email }) => <span className="[overflow-wrap:anywhere]">{email}</span>,
    },
    { key: 'role', header: 'Role', cell: ({ role }) => roleWords[role] },
    { key: 'by', header: 'By', cell: ({ invitedBy }) => invitedBy },
    {
      key: 'expires',
      header: 'Link works',
      cell: ({ expired, expiresAt }) =>
        expired ? <StatusWord tone="amber">Expired</StatusWord> : `until ${formatDateTime(expiresAt)}`,
    },
    {
      key: 'change',
      header: 'Change',
      cell: (invitation) => <InvitationChange organisationId={organisationId} invitation={invitation} />,
    },
  ];
  return <DataTable caption="Invitations, newest first" columns={columns} rowKey={({ id }) => id} {...table} />;
}

function InvitationChange({ organisationId, invitation }: { organisationId: string; invitation: InvitationRow }) {
  const [isAsked, setAsked] = useState(false);
  const again = useInviteAgain(organisationId);
  const withdraw = useWithdraw(organisationId);
  const showToast = useToast();

  function sendAgain() {
    again.mutate(invitation.id, {
      onSuccess: () => showToast(`${invitation.email} gets a new link; the one before has ended.`, 'held'),
      onError: (error) => showToast(problemText(error), 'amber'),
    });
  }

  return (
    <>
      {again.isPending ? (
        <Button busy={true} busyLabel="Sending">
          Change
        </Button>
      ) : (
        <Menu label="Change" of={invitation.email}>
          <MenuItem onSelect={sendAgain}>Send a new link</MenuItem>
          <MenuItem onSelect={() => setAsked(true)}>Withdraw …</MenuItem>
        </Menu>
      )}
      <ConfirmDialog
        isOpen={isAsked}
        onOpenChange={(next) => {
          withdraw.reset();
          setAsked(next);
        }}
        title="Withdraw this invitation?"
        consequence={`The link that ${invitation.email} was sent ends at once. You can invite them again.`}
        confirmWord="Withdraw"
        keepWord="Keep it"
        busy={withdraw.isPending}
        problem={withdraw.error === null ? undefined : problemText(withdraw.error)}
        onConfirm={() => withdraw.mutate(invitation.id, { onSuccess: () => setAsked(false) })}
      />
    </>
  );
}
