import { useState } from 'react';
import { Actions } from '../actions.tsx';
import { Button } from '../button.tsx';
import { ConfirmDialog } from '../confirm-dialog.tsx';
import { Dialog } from '../dialog.tsx';
import { Facts } from '../facts.tsx';
import { useToast } from '../toast.tsx';
import { GallerySection } from './gallery-section.tsx';

type Opened = 'none' | 'levels' | 'end' | 'sign-out';

const levels = [
  { label: 'Before', value: '0.04 dB' },
  { label: 'At half time', value: '0.05 dB' },
  { label: 'After', value: 'to do', isWords: true },
];

export function OverlaySection() {
  const [opened, setOpened] = useState<Opened>('none');
  const show = useToast();
  const close = (isOpen: boolean) => (isOpen ? undefined : setOpened('none'));

  function end(reason: string) {
    setOpened('none');
    show(reason === '' ? 'Signed out everywhere.' : `The session ended: ${reason}`);
  }

  return (
    <GallerySection title="What floats">
      <Actions>
        <Button onClick={() => setOpened('levels')}>Show the levels</Button>
        <Button onClick={() => setOpened('end')}>End session ...</Button>
        <Button onClick={() => setOpened('sign-out')}>Sign out everywhere ...</Button>
        <Button onClick={() => show('The answer of L03 is held.', 'held')}>Show news</Button>
        <Button onClick={() => show('L04 has been away for 40 s.', 'amber')}>Show what needs a look</Button>
      </Actions>
      <Dialog
        isOpen={opened === 'levels'}
        onOpenChange={close}
        title="Levels at the load"
        description="Largest difference between the two codes, at 1 kHz."
        actions={<Button variant="primary">Measure again</Button>}
      >
        <Facts facts={levels} />
      </Dialog>
      <ConfirmDialog
        isOpen={opened === 'end'}
        onOpenChange={close}
        title="End this session?"
        consequence="6 of 16 trials are locked and count. The session keeps its number and cannot be opened again."
        confirmWord="End session"
        keepWord="Go on listening"
        reason={{ label: 'Reason', hint: 'One sentence; everybody who reads the result reads it.' }}
        onConfirm={end}
      />
      <ConfirmDialog
        isOpen={opened === 'sign-out'}
        onOpenChange={close}
        title="Sign out everywhere?"
        consequence="Every browser in which you are signed in will ask for your password again."
        confirmWord="Sign out everywhere"
        keepWord="Stay signed in"
        onConfirm={end}
      />
    </GallerySection>
  );
}
