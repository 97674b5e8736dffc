import { createContext, type ReactNode, useCallback, useContext, useEffect, useState } from 'react';
import { classNames } from './class-names.ts';

type ToastTone = 'note' | 'held' | 'amber';
type Toast = { id: number; message: string; tone: ToastTone };
type ShowToast = (message: string, tone?: ToastTone) => void;

const ToastContext = createContext<ShowToast | null>(null);

const shownMs = 8000;
const rules: Record<ToastTone, string> = { note: 'border-l-edge', held: 'border-l-jacket', amber: 'border-l-amber' };

/** Holds the region in which short news appear; put it once around the application. */
export function ToastProvider({ children }: { children: ReactNode }) {
  const [toasts, setToasts] = useState<readonly Toast[]>([]);
  const show = useCallback<ShowToast>((message, tone = 'note') => {
    setToasts((current) => [...current, { id: (current.at(-1)?.id ?? 0) + 1, message, tone }]);
  }, []);
  const dismiss = useCallback((id: number) => setToasts((current) => current.filter((toast) => toast.id !== id)), []);
  return (
    <ToastContext value={show}>
      {children}
      <section
        aria-label="News"
        aria-live="polite"
        className="pointer-events-none fixed inset-x-4 bottom-4 z-60 flex flex-col items-start gap-3 print:hidden"
      >
        {toasts.map((toast) => (
          <ToastCard key={toast.id} toast={toast} onDismiss={dismiss} />
        ))}
      </section>
    </ToastContext>
  );
}

/** Says something that needs no answer. What needs a look (amber) stays until it is closed. */
export function useToast(): ShowToast {
  const show = useContext(ToastContext);
  if (!show) throw new Error('useToast needs a ToastProvider around it');
  return show;
}

type ToastCardProps = { toast: Toast; onDismiss: (id: number) => void };

/** Waits while the pointer rests on it or it holds the focus. */
function ToastCard({ toast, onDismiss }: ToastCardProps) {
  const [isHeld, setHeld] = useState(false);
  useEffect(() => {
    if (isHeld || toast.tone === 'amber') return;
    const timer = setTimeout(() => onDismiss(toast.id), shownMs);
    return () => clearTimeout(timer);
  }, [isHeld, toast, onDismiss]);
  return (
    <article
      onMouseEnter={() => setHeld(true)}
      onMouseLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
      className={classNames(
        'pointer-events-auto flex w-full max-w-md items-center justify-between gap-5 rounded border border-l-[5px] border-rule bg-sheet py-2 pr-2 pl-4 shadow-float',
        rules[toast.tone],
      )}
    >
      <span className="min-w-0 [overflow-wrap:anywhere]">{toast.message}</span>
      <button
        type="button"
        onClick={() => onDismiss(toast.id)}
        className="min-h-11 shrink-0 cursor-pointer rounded px-3 font-semibold underline underline-offset-4 hover:decoration-2"
      >
        Close
      </button>
    </article>
  );
}
