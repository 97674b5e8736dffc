import { Skeleton } from '../ui/skeleton.tsx';
import { PlainLayout } from './layouts/plain-layout.tsx';
import { paths } from './paths.ts';

/** Shown until the first page is there. */
export function FirstPaint() {
  return (
    <PlainLayout homeTo={paths.start()}>
      <Skeleton label="Loading the page" lines={5} className="max-w-xl" />
    </PlainLayout>
  );
}
