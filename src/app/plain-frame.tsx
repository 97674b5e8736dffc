import { Outlet } from 'react-router-dom';
import { ProblemPage } from '../pages/problem-page.tsx';
import { PlainLayout } from './layouts/plain-layout.tsx';
import { paths } from './paths.ts';

/** Around pages that belong to no organisation. */
export function PlainFrame() {
  return (
    <PlainLayout homeTo={paths.start()}>
      <Outlet />
    </PlainLayout>
  );
}

/** A problem where no frame is left standing. */
export function PlainProblem() {
  return (
    <PlainLayout homeTo={paths.start()}>
      <ProblemPage />
    </PlainLayout>
  );
}
