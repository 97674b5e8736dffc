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

const fields = 'input, textarea, select, [role="dialog"], [role="alertdialog"]';
const isWithin = (target: EventTarget | null, selector: string) =>
  target instanceof Element && target.closest(selector) !== null;

/** A control that was reached with the tab key takes the space bar itself, unless it is the next act. */
const takesSpaceItself = (target: EventTarget | null) =>
  isWithin(target, 'button, a, summary') && !isWithin(target, '[data-next-act]');

/**
 * The space bar for the next act (repeats within 400 ms are ignored), Alt and a letter for the others. Nothing of it
 * while something is typed or a dialog is open.
 */
export function useKeys(next: (() => void) | null, letters: Readonly<Record<string, () => void>>, isOn: boolean): void {
  const [hand] = useState({ actedAt: Number.NEGATIVE_INFINITY, isTabbing: false, isSpaceOurs: false });

  const pressSpace = (event: KeyboardEvent) => {
    if (hand.isTabbing && takesSpaceItself(event.target)) return;
    event.preventDefault();
    hand.isSpaceOurs = true;
    if (event.repeat || next === null || performance.now() - hand.actedAt < repeatMs) return;
    hand.actedAt = performance.now();
    next();
  };
  const press = useEffectEvent((event: KeyboardEvent) => {
    if (event.key === 'Tab') hand.isTabbing = true;
    const isAsked = document.querySelector('[role="dialog"], [role="alertdialog"]') !== null;
    if (isAsked || isWithin(event.target, fields) || event.ctrlKey || event.metaKey) return;
    if (event.code === 'Space' && !event.altKey) return pressSpace(event);
    const act = isOn && event.altKey ? letters[event.code.replace('Key', '').toLowerCase()] : undefined;
    if (act === undefined || event.repeat) return;
    event.preventDefault();
    act();
  });
  // Some browsers press the focused button when the space bar comes up again.
  const release = useEffectEvent((event: KeyboardEvent) => {
    if (event.code !== 'Space' || !hand.isSpaceOurs) return;
    hand.isSpaceOurs = false;
    event.preventDefault();
  });
  const point = useEffectEvent(() => {
    hand.isTabbing = false;
  });
  useEffect(() => {
    document.addEventListener('keydown', press);
    document.addEventListener('keyup', release);
    document.addEventListener('pointerdown', point);
    return () => {
      document.removeEventListener('keydown', press);
      document.removeEventListener('keyup', release);
      document.removeEventListener('pointerdown', point);
    };
  }, []);
}
