import type { ConsoleActions } from './use-console.ts';

/** What every dialog of the console is given. */
export type ConsoleDialogProps = {
  isOpen: boolean;
  onOpenChange: (isOpen: boolean) => void;
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem'>;
};
