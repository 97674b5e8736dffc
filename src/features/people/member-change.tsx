import { useState } from 'react';
import { type Role, roles } from '#shared/contracts/endpoint.ts';
import type { PersonRow } from '#shared/contracts/people.ts';
import { roleWords } from '../../lib/role-words.ts';
import { problemText } from '../../lib/show-problem.ts';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { Menu, MenuItem, MenuSeparator } from '../../ui/menu.tsx';
import { useToast } from '../../ui/toast.tsx';
import { removalConsequence, roleConsequence } from './member-words.ts';
import { useChangeRole, useRemoveMember } from './people.queries.ts';

type MemberChangeProps = {
  organisationId: string;
  person: PersonRow;
  /** Called once it is done. */
  onChanged: () => void;
};

type Asked = { kind: 'role'; role: Role } | { kind: 'remove' };

/** Another role, or the end of a membership; each asked once. */
export function MemberChange({ organisationId, person, onChanged }: MemberChangeProps) {
  const [asked, setAsked] = useState<Asked | null>(null);
  return (
    <>
      <Menu label="Change" of={person.name}>
        {roles
          .filter((role) => role !== person.role)
          .map((role) => (
            <MenuItem key={role} onSelect={() => setAsked({ kind: 'role', role })}>
              Make {roleWords[role].toLowerCase()} …
            </MenuItem>
          ))}
        <MenuSeparator />
        <MenuItem onSelect={() => setAsked({ kind: 'remove' })}>Remove …</MenuItem>
      </Menu>
      <RoleQuestion
        organisationId={organisationId}
        person={person}
        role={asked?.kind === 'role' ? asked.role : null}
        onClose={() => setAsked(null)}
        onChanged={onChanged}
      />
      <RemovalQuestion
        organisationId={organisationId}
        person={person}
        isOpen={asked?.kind === 'remove'}
        onClose={() => setAsked(null)}
        onChanged={onChanged}
      />
    </>
  );
}

type QuestionProps = MemberChangeProps & { onClose: () => void };

function RoleQuestion({ organisationId, person, role, onClose, onChanged }: QuestionProps & { role: Role | null }) {
  const change = useChangeRole(organisationId);
  const showToast = useToast();
  const word = role === null ? '' : roleWords[role].toLowerCase();

  function confirm(chosen: Role) {
    change.mutate(
      { id: person.id, role: chosen },
      {
        onSuccess: () => {
          onClose();
          showToast(`${person.name} is ${word} now, and is told by mail.`, 'held');
          onChanged();
        },
      },
    );
  }

  return (
    <ConfirmDialog
      isOpen={role !== null}
      onOpenChange={() => {
        change.reset();
        onClose();
      }}
      title={`Make ${person.name} ${word}?`}
      consequence={role === null ? '' : roleConsequence(person, role)}
      confirmWord={`Make ${word}`}
      keepWord={`Keep as ${roleWords[person.role].toLowerCase()}`}
      busy={change.isPending}
      problem={change.error === null ? undefined : problemText(change.error)}
      onConfirm={() => (role === null ? undefined : confirm(role))}
    />
  );
}

function RemovalQuestion({ organisationId, person, isOpen, onClose, onChanged }: QuestionProps & { isOpen: boolean }) {
  const remove = useRemoveMember(organisationId);
  const showToast = useToast();

  function confirm() {
    remove.mutate(person.id, {
      onSuccess: () => {
        onClose();
        showToast(`${person.name} is removed, and is told by mail.`, 'held');
        onChanged();
      },
    });
  }

  return (
    <ConfirmDialog
      isOpen={isOpen}
      onOpenChange={() => {
        remove.reset();
        onClose();
      }}
      title={`Remove ${person.name}?`}
      consequence={removalConsequence(person)}
      confirmWord="Remove"
      keepWord="Keep as a member"
      busy={remove.isPending}
      problem={remove.error === null ? undefined : problemText(remove.error)}
      onConfirm={confirm}
    />
  );
}
