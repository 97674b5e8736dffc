import { type RefObject, useEffect, useEffectEvent, useState } from 'react';

const pauseMs = 1_000;
const taken = 'input, textarea, select, [role="dialog"], [role="alertdialog"]';

const isTyped = ({ key, altKey, ctrlKey, metaKey }: KeyboardEvent) =>
  /^[a-z\d]$/i.test(key) && !altKey && !ctrlKey && !metaKey;

/**
 * A keyboard scanner anywhere on the page. Where a label is wanted its first key goes to the field for it, and with it all
 * that follow. Where none is wanted the whole is read all the same and given on, so that it is refused in words: its Enter
 * must not press whatever button has the focus.
 */
export function useScanner(field: RefObject<HTMLInputElement | null>, onStray: (text: string) => void): void {
  const [seen] = useState({ text: '', at: Number.NEGATIVE_INFINITY });
  const press = useEffectEvent((event: KeyboardEvent) => {
    const { target } = event;
    if (target instanceof Element && target.closest(taken) !== null) return;
    if (document.querySelector('[role="dialog"], [role="alertdialog"]') !== null) return;
    const now = performance.now();
    if (now - seen.at > pauseMs) seen.text = '';
    if (isTyped(event)) {
      const { current } = field;
      if (current !== null) {
        current.value = '';
        current.focus();
        return;
      }
      seen.text += event.key;
      seen.at = now;
      return;
    }
    if (event.key !== 'Enter' || seen.text === '') return;
    event.preventDefault();
    event.stopPropagation();
    const { text } = seen;
    seen.text = '';
    onStray(text);
  });
  useEffect(() => {
    document.addEventListener('keydown', press, true);
    return () => document.removeEventListener('keydown', press, true);
  }, []);
}
