import { useCallback, useEffect, useRef, useState } from 'react';
import type { Check } from '#shared/ledger/verify.ts';
import type { VerifyMessage } from './verify-worker.ts';

export type Verification = {
  readonly phase: 'fetching' | 'checking' | 'done' | 'unreadable' | 'broken';
  /** The name of the visitor's own file, or null for the published one. */
  readonly fileName: string | null;
  readonly digest: string | null;
  readonly checks: readonly Check[];
};

const atFirst = (fileName: string | null): Verification => ({ phase: 'fetching', fileName, digest: null, checks: [] });

function after(before: Verification, message: VerifyMessage): Verification {
  if ('digest' in message) return { ...before, phase: 'checking', digest: message.digest };
  if ('check' in message) return { ...before, checks: [...before.checks, message.check] };
  return { ...before, phase: 'done' };
}

async function download(path: string): Promise<ArrayBuffer> {
  const response = await fetch(path, { cache: 'no-cache' });
  if (!response.ok) throw new Error(`the file was answered with ${response.status}`);
  return response.arrayBuffer();
}

/** Checks the published file as soon as the page is there, and whatever file the visitor gives it instead. */
export function useVerification(path: string) {
  const [verification, setVerification] = useState(() => atFirst(null));
  const worker = useRef<Worker | null>(null);

  const check = useCallback((fileName: string | null, read: () => Promise<ArrayBuffer>) => {
    worker.current?.terminate();
    const own = new Worker(new URL('./verify-worker.ts', import.meta.url), { type: 'module' });
    worker.current = own;
    // Only the latest worker is heard: an earlier file may still be on its way.
    const tell = (change: (before: Verification) => Verification) => {
      if (worker.current === own) setVerification(change);
    };
    tell(() => atFirst(fileName));
    own.onmessage = ({ data }: MessageEvent<VerifyMessage>) => tell((before) => after(before, data));
    own.onerror = () => tell((before) => ({ ...before, phase: 'broken' }));
    read().then(
      (bytes) => own.postMessage(bytes, [bytes]),
      () => tell((before) => ({ ...before, phase: 'unreadable' })),
    );
  }, []);

  const checkPublished = useCallback(() => check(null, () => download(path)), [check, path]);
  const checkFile = useCallback((file: File) => check(file.name, () => file.arrayBuffer()), [check]);

  useEffect(() => {
    checkPublished();
    return () => {
      worker.current?.terminate();
      worker.current = null;
    };
  }, [checkPublished]);

  return { verification, checkPublished, checkFile };
}
