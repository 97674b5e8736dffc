import { useCallback, useEffect, useRef, useState } from 'react';
import { bundleCheckNames, type NamedCheck } from '#shared/ledger/check-names.ts';
import type { Check } from '#shared/ledger/verify.ts';
import type { ReceiptsOutcome, VerifyMessage, VerifyRequest } from './verify-worker.ts';

export type Verification = {
  readonly phase: 'waiting' | 'fetching' | 'checking' | 'done' | 'unreadable' | 'broken';
  /** The name of the visitor's own file, or null for the published one. */
  readonly fileName: string | null;
  /** Of the document, alone or in a bundle. */
  readonly digest: string | null;
  /** Every check to come, in order. */
  readonly names: readonly NamedCheck[];
  readonly checks: readonly Check[];
  /** Of the text that was looked up last; null before. */
  readonly receipts: ReceiptsOutcome | null;
};

const atFirst = (phase: Verification['phase'], fileName: string | null): Verification => ({
  phase,
  fileName,
  digest: null,
  names: bundleCheckNames,
  checks: [],
  receipts: null,
});

function after(before: Verification, message: VerifyMessage): Verification {
  if ('digest' in message) return { ...before, phase: 'checking', digest: message.digest, names: message.names };
  if ('check' in message) return { ...before, checks: [...before.checks, message.check] };
  if ('receipts' in message) return { ...before, receipts: message.receipts };
  return { ...before, phase: 'done' };
}

async function download(path: string): Promise<ArrayBuffer> {
  const response = await fetch(path, { cache: 'no-cache' });
  if (!response.ok) throw new Error(`the file was answered with ${response.status}`);
  return response.arrayBuffer();
}

/**
 * Checks the published file as soon as the page is there, and whatever file the visitor gives it instead.
 *
 * @param path where the published file is, or null where the visitor brings one
 */
export function useVerification(path: string | null) {
  const [verification, setVerification] = useState(() => atFirst(path === null ? 'waiting' : 'fetching', null));
  const worker = useRef<Worker | null>(null);

  const check = useCallback((fileName: string | null, read: () => Promise<ArrayBuffer>) => {
    worker.current?.terminate();
    const own = new Worker(new URL('./verify-worker.ts', import.meta.url), { type: 'module' });
    worker.current = own;
    // Only the latest worker is heard: an earlier file may still be on its way.
    const tell = (change: (before: Verification) => Verification) => {
      if (worker.current === own) setVerification(change);
    };
    tell(() => atFirst('fetching', fileName));
    own.onmessage = ({ data }: MessageEvent<VerifyMessage>) => tell((before) => after(before, data));
    own.onerror = () => tell((before) => ({ ...before, phase: 'broken' }));
    read().then(
      (file) => own.postMessage({ file } satisfies VerifyRequest, [file]),
      () => tell((before) => ({ ...before, phase: 'unreadable' })),
    );
  }, []);

  const checkPublished = useCallback(() => {
    if (path !== null) check(null, () => download(path));
  }, [check, path]);
  const checkFile = useCallback((file: File) => check(file.name, () => file.arrayBuffer()), [check]);

  const checkReceipts = useCallback((text: string) => {
    worker.current?.postMessage({ receipts: text } satisfies VerifyRequest);
  }, []);

  useEffect(() => {
    checkPublished();
    return () => {
      worker.current?.terminate();
      worker.current = null;
    };
  }, [checkPublished]);

  return { verification, checkPublished, checkFile, checkReceipts };
}
