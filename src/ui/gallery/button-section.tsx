import { useState } from 'react';
import { Actions } from '../actions.tsx';
import { Button } from '../button.tsx';
import { CopyButton } from '../copy-button.tsx';
import { Countdown } from '../countdown.tsx';
import { KeyHint } from '../key-hint.tsx';
import { LinkButton } from '../link-button.tsx';
import { GallerySection } from './gallery-section.tsx';

const bundleDigest = '9b1f5c0de27a4b83';
const waitMs = 18_000;

export function ButtonSection() {
  const [busy, setBusy] = useState(false);
  const [deadlineMs, setDeadlineMs] = useState(() => Date.now() + waitMs);
  const [isWaiting, setWaiting] = useState(true);

  function waitAgain() {
    setDeadlineMs(Date.now() + waitMs);
    setWaiting(true);
  }

  return (
    <GallerySection title="Buttons" note="One primary act on a page. What ends something stands apart.">
      <Actions stop={<Button variant="stop">End session</Button>}>
        <Button variant="primary">Seal the protocol</Button>
        <Button keyHint="Alt+B">Break</Button>
        <Button busy={busy} onClick={() => setBusy(true)}>
          Fetch the timestamp
        </Button>
        <Button variant="primary" disabled>
          Publish
        </Button>
        <Button variant="quiet">Leave the session</Button>
      </Actions>
      <div className="flex flex-wrap items-center gap-3">
        <Button busy={true} busyLabel="Sealing">
          Seal the protocol
        </Button>
        <Button disabled={!busy} onClick={() => setBusy(false)}>
          Let the busy ones go
        </Button>
        <LinkButton to="/kit">Open the report</LinkButton>
        <LinkButton to="/kit" variant="primary">
          Plan a study
        </LinkButton>
        <CopyButton text={bundleDigest} label="Copy the digest" />
        <span>
          or press <KeyHint keys="Alt+V" />
        </span>
      </div>
      <div className="grid max-w-4xl gap-3 sm:grid-cols-[2fr_1fr]">
        <Button variant="primary" size="large" keyHint="Space">
          417 is in
        </Button>
        <Button size="large" disabled={isWaiting} onClick={waitAgain}>
          {isWaiting ? (
            <>
              Listening starts in <Countdown deadlineMs={deadlineMs} onEnd={() => setWaiting(false)} />
            </>
          ) : (
            'Wait again'
          )}
        </Button>
      </div>
    </GallerySection>
  );
}
