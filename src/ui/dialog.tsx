import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { Button } from './button.tsx';
import { dialogLook, dialogTitleLook, veilLook } from './dialog-look.ts';
import { useReturnFocus } from './return-focus.ts';

type DialogProps = {
  isOpen: boolean;
  onOpenChange: (isOpen: boolean) => void;
  title: string;
  /** One sentence that says what this is for; read out with the title. */
  description: ReactNode;
  /** Buttons at the foot, beside "Close". A form inside brings its own and leaves this out. */
  actions?: ReactNode;
  children?: ReactNode;
};

export function Dialog({ isOpen, onOpenChange, title, description, actions, children }: DialogProps) {
  const focus = useReturnFocus();
  return (
    <Radix.Root open={isOpen} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className={veilLook} />
        <Radix.Content className={dialogLook} onOpenAutoFocus={focus.remember} onCloseAutoFocus={focus.giveBack}>
          <div className="flex flex-col gap-2">
            <Radix.Title className={dialogTitleLook}>{title}</Radix.Title>
            <Radix.Description className="text-soft">{description}</Radix.Description>
          </div>
          {children}
          <div className="flex flex-wrap items-center justify-end gap-3">
            <Radix.Close asChild>
              <Button>Close</Button>
            </Radix.Close>
            {actions}
          </div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
