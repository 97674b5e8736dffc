import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Caret } from './caret.tsx';

const itemLook =
  'flex min-h-12 cursor-pointer items-center rounded px-3 text-ink no-underline outline-none ' +
  'data-highlighted:bg-ink data-highlighted:text-page data-disabled:cursor-not-allowed data-disabled:text-soft';

type MenuProps = {
  /** What the button shows; also the menu's name. */
  label: string;
  /** What it is about, where several look alike; read out only. */
  of?: string;
  children: ReactNode;
};

/** A button that opens a short list of acts and places. */
export function Menu({ label, of, children }: MenuProps) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger
        aria-label={of === undefined ? undefined : `${label}: ${of}`}
        className="-mx-2 inline-flex max-w-64 min-h-12 cursor-pointer items-center gap-2 rounded px-2 text-left text-soft hover:text-ink data-[state=open]:text-ink"
      >
        <span className="min-w-0 truncate">{label}</span>
        <Caret direction="down" />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={6}
          collisionPadding={12}
          className="z-40 min-w-56 rounded border border-rule bg-sheet p-1.5 shadow-float print:hidden"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

type MenuItemProps = { onSelect: () => void; disabled?: boolean; children: ReactNode };

export function MenuItem({ onSelect, disabled, children }: MenuItemProps) {
  return (
    <DropdownMenu.Item disabled={disabled} onSelect={onSelect} className={itemLook}>
      {children}
    </DropdownMenu.Item>
  );
}

type MenuLinkProps = { to: string; isCurrent?: boolean; children: ReactNode };

export function MenuLink({ to, isCurrent, children }: MenuLinkProps) {
  return (
    <DropdownMenu.Item asChild>
      <Link to={to} aria-current={isCurrent ? 'true' : undefined} className={itemLook}>
        {children}
      </Link>
    </DropdownMenu.Item>
  );
}

export function MenuHeading({ children }: { children: ReactNode }) {
  return <DropdownMenu.Label className="px-3 py-2 text-soft">{children}</DropdownMenu.Label>;
}

export function MenuSeparator() {
  return <DropdownMenu.Separator className="my-1.5 border-t border-rule" />;
}
