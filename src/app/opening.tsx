import { useEffect, useState } from 'react';
import { useNavigation } from 'react-router-dom';

const patienceMs = 400;

/** Says that the next page is on its way, once that takes long enough to be noticed. */
export function Opening() {
  const { state } = useNavigation();
  const [isSlow, setSlow] = useState(false);
  useEffect(() => {
    if (state === 'idle') return;
    const timer = setTimeout(() => setSlow(true), patienceMs);
    return () => {
      clearTimeout(timer);
      setSlow(false);
    };
  }, [state]);
  return (
    <output className="pointer-events-none fixed inset-x-0 top-0 z-50 flex justify-center print:hidden">
      {isSlow ? (
        <span className="rounded-b border border-t-0 border-rule bg-sheet px-4 py-1.5 shadow-float">Opening …</span>
      ) : null}
    </output>
  );
}
