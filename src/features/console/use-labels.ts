import { type RefObject, useRef, useState } from 'react';
import type { ProctorView, ScannedBy } from '#shared/contracts/proctor-live.ts';
import type { ConsoleActions } from './use-console.ts';
import { useScanner } from './use-scanner.ts';

export type Labels = {
  readonly field: RefObject<HTMLInputElement | null>;
  /** Whether a label is to be held up now. */
  readonly isWanted: boolean;
  readonly isCameraOn: boolean;
  readonly setCameraOn: (isOn: boolean) => void;
  readonly take: (text: string, by: ScannedBy) => void;
};

/** Whether the sleeves are being gone through and some are still to come. */
export const isCounting = ({ inventory }: Pick<ProctorView, 'inventory'>): boolean =>
  inventory !== null && !inventory.isEnded && inventory.found.length < inventory.of;

export const isScanning = ({ trial }: Pick<ProctorView, 'trial'>): boolean =>
  trial?.step === 'scan' && trial.scannedEnds < 2;

/** Labels as they come in, however they do. */
export function useLabels(view: ProctorView | null, { act }: Pick<ConsoleActions, 'act'>): Labels {
  const field = useRef<HTMLInputElement>(null);
  const [isCameraOn, setCameraOn] = useState(false);
  const take = (text: string, by: ScannedBy) => void act({ kind: 'scan-label', text: text.slice(0, 64), by });
  // A label that nobody asked for is told so by the server, in the same words wherever it happens.
  useScanner(field, (text) => (view?.phase === 'running' ? take(text, 'scanner') : undefined));
  return { field, isWanted: view !== null && (isCounting(view) || isScanning(view)), isCameraOn, setCameraOn, take };
}
