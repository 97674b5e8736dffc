import { useState } from 'react';
import { usePageTheme } from '../app/layouts/page-theme.ts';
import { Observing } from '../features/observers/observing.tsx';
import { useObserving } from '../features/observers/use-observing.ts';
import { useDocumentTitle } from '../ui/document-title.ts';

/** A witness's page; what opens it stands behind the #, which no server is sent. */
export function Component() {
  usePageTheme('dim');
  useDocumentTitle('Watch a session');
  const [token] = useState(() => window.location.hash.slice(1));
  const { view, connection, refused, clockOffsetMs, send } = useObserving(token);
  if (refused !== null) return <Word title="This link leads to no session" detail={refused.message} />;
  if (view === null) return <Word title="Finding the session" detail="This takes a moment." />;
  return <Observing view={view} isLost={connection === 'lost'} clockOffsetMs={clockOffsetMs} send={send} />;
}

function Word({ title, detail }: { title: string; detail: string }) {
  return (
    <main role="status" className="mx-auto flex min-h-dvh max-w-2xl flex-col justify-center gap-3 px-5">
      <h1 className="text-3xl">{title}</h1>
      <p className="text-xl text-soft">{detail}</p>
    </main>
  );
}
