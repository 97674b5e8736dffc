import { useEffect, useEffectEvent, useState } from 'react';

const settingKey = 'fairlead console keys';
const repeatMs = 400;

/** Whether Alt and a letter act on the console; kept on this device. */
export function useKeySetting(): [boolean, (isOn: boolean) => void] {
  const [isOn, setOn] = useState(() => localStorage.getItem(settingKey) !== 'off');
  const set = (next: boolean) => {
    localStorage.setItem(settingKey, next ? 'on' : 'off');
    setOn(next);
  };
  return [isOn, set];
}

const isTyping = (target: EventTarget | null) =>
  target instanceof HTMLElement &&
  target.closest('input, textarea, select, [role="dialog"], [role="alertdialog"]') !== null;

/** The space bar for the next act (repeats within 400 ms are ignored), Alt and a letter for the others. */
export function useKeys(next: (() => void) | null, letters: Readonly<Record<string, () => void>>, isOn: boolean): void {
  const [last] = useState({ at: 0 });
  const press = useEffectEvent((event: KeyboardEvent) => {
    const isDialogOpen = document.querySelector('[role="dialog"], [role="alertdialog"]') !== null;
    if (isTyping(event.target) || isDialogOpen) return;
    if (event.code === 'Space' && !event.altKey && !event.ctrlKey && !event.metaKey) {
      event.preventDefault();
      if (event.repeat || next === null || performance.now() - last.at < repeatMs) return;
      last.at = performance.now();
      next();
      return;
    }
    const act =
      isOn && event.altKey && !event.ctrlKey ? letters[event.code.replace('Key', '').toLowerCase()] : undefined;
    if (act === undefined) return;
    event.preventDefault();
    act();
  });
  useEffect(() => {
    document.addEventListener('keydown', press);
    return () => document.removeEventListener('keydown', press);
  }, []);
}
