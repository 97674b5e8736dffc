import jsQR from 'jsqr';
import { useEffect, useEffectEvent, useRef, useState } from 'react';
import { readLabel } from '#shared/session/label-text.ts';

const everyMs = 150;
/** The same label is held in front of the camera for a while; it counts once. */
const sameLabelMs = 2_500;
const widest = 640;

/** What stands in the way of a camera here, in words; null when nothing does. */
function obstacle(): string | null {
  if (!window.isSecureContext)
    return `A browser opens the camera only over https, or on the machine itself. This page came from ${window.location.host} without it. Use a scanner, type the code, or give Fairlead a certificate (guide “On the local network”).`;
  if (navigator.mediaDevices === undefined)
    return 'This browser has no camera to offer. Use a scanner, or type the code.';
  return null;
}

function refusalWords(error: unknown): string {
  const name = error instanceof DOMException ? error.name : '';
  if (name === 'NotAllowedError')
    return 'The camera is not allowed on this page. Allow it beside the address, or use a scanner, or type the code.';
  if (name === 'NotFoundError') return 'No camera was found. Use a scanner, or type the code.';
  return 'The camera could not be opened; another program may be using it. Use a scanner, or type the code.';
}

/** Reads labels by the camera; the picture stays on this device. */
export function CameraScan({ onText }: { onText: (text: string) => void }) {
  const video = useRef<HTMLVideoElement>(null);
  const [fault, setFault] = useState(obstacle);
  const isBlocked = fault !== null;
  const read = useEffectEvent(onText);

  useEffect(() => {
    if (isBlocked) return;
    let stream: MediaStream | null = null;
    let isOver = false;
    let last = { text: '', at: Number.NEGATIVE_INFINITY };
    const canvas = document.createElement('canvas');
    const look = () => {
      const shown = video.current;
      const pen = canvas.getContext('2d', { willReadFrequently: true });
      if (shown === null || pen === null || shown.videoWidth === 0) return;
      const scale = Math.min(1, widest / shown.videoWidth);
      canvas.width = Math.round(shown.videoWidth * scale);
      canvas.height = Math.round(shown.videoHeight * scale);
      pen.drawImage(shown, 0, 0, canvas.width, canvas.height);
      const { data, width, height } = pen.getImageData(0, 0, canvas.width, canvas.height);
      const text = jsQR(data, width, height, { inversionAttempts: 'dontInvert' })?.data ?? '';
      const now = performance.now();
      if (readLabel(text) === null || (text === last.text && now - last.at < sameLabelMs)) return;
      last = { text, at: now };
      read(text);
    };
    navigator.mediaDevices
      .getUserMedia({ video: { facingMode: 'environment' }, audio: false })
      .then((opened) => {
        stream = opened;
        if (isOver) return stopAll(opened);
        if (video.current !== null) video.current.srcObject = opened;
      })
      .catch((error: unknown) => setFault(refusalWords(error)));
    const timer = setInterval(look, everyMs);
    return () => {
      isOver = true;
      clearInterval(timer);
      if (stream !== null) stopAll(stream);
    };
  }, [isBlocked]);

  if (fault !== null)
    return (
      <p role="alert" className="max-w-[46rem] border-l-4 border-amber pl-3 text-amber">
        {fault}
      </p>
    );
  return (
    <figure className="flex max-w-80 flex-col gap-1">
      <video ref={video} autoPlay={true} playsInline={true} muted={true} className="w-full rounded bg-sheet" />
      <figcaption className="text-soft">
        Hold one label at a time before it. The picture stays on this device.
      </figcaption>
    </figure>
  );
}

function stopAll(stream: MediaStream): void {
  for (const track of stream.getTracks()) track.stop();
}
