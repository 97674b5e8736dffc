import { useState } from 'react';
import { personalLinkApi } from '#shared/contracts/personal-link.ts';
import { Problem } from '#shared/problem.ts';
import { call } from '../lib/call.ts';
import { Button } from '../ui/button.tsx';

/** Hands the phone the session as a calendar file. */
export function CalendarButton({ token }: { token: string }) {
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const save = async () => {
    setBusy(true);
    setProblem(null);
    try {
      const { fileName, content } = await call(personalLinkApi.calendar, { body: { token } });
      const address = URL.createObjectURL(new Blob([content], { type: 'text/calendar;charset=utf-8' }));
      Object.assign(document.createElement('a'), { href: address, download: fileName }).click();
      // A browser may read the file only after this turn.
      setTimeout(() => URL.revokeObjectURL(address), 60_000);
    } catch (error) {
      if (!(error instanceof Problem)) throw error;
      setProblem(error.message);
    } finally {
      setBusy(false);
    }
  };

  return (
    <div className="flex flex-col gap-2">
      <Button size="touch" busy={busy} onClick={() => void save()}>
        Add to calendar
      </Button>
      <p role="alert" className="font-bold text-amber empty:hidden">
        {problem}
      </p>
    </div>
  );
}
