import { isRouteErrorResponse, Navigate, useLocation, useRouteError } from 'react-router-dom';
import { Problem } from '#shared/problem.ts';
import { paths } from '../app/paths.ts';
import { problemOf } from '../lib/show-problem.ts';
import { Button } from '../ui/button.tsx';
import { useDocumentTitle } from '../ui/document-title.ts';
import { ErrorState } from '../ui/error-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';

/** Stands where a page failed to open. Whoever is not signed in is sent to do so, and comes back here. */
export function ProblemPage() {
  const error = useRouteError();
  const { pathname, search } = useLocation();
  const problem = problemBehind(error);
  if (problem.code === 'not-signed-in') return <Navigate replace to={paths.signIn(pathname + search)} />;
  return <ProblemShown problem={problem} />;
}

/** What a page says instead of a form's words: nothing was being typed here. */
const unreachableDetail = 'Nothing that was saved is lost. Check the connection and try again.';

function ProblemShown({ problem }: { problem: Problem }) {
  useDocumentTitle(problem.title);
  const isWorthRepeating = problem.status >= 500 || problem.status === 0;
  return (
    <>
      <h1 className="sr-only">{problem.title}</h1>
      <ErrorState
        title={problem.title}
        detail={problem.code === 'unreachable' ? unreachableDetail : problem.message}
        requestId={problem.instance?.replace('urn:uuid:', '')}
        actions={
          <>
            {isWorthRepeating ? (
              <Button variant="primary" onClick={() => window.location.reload()}>
                Try again
              </Button>
            ) : null}
            <LinkButton variant={isWorthRepeating ? 'plain' : 'primary'} to={paths.start()}>
              Go to the start
            </LinkButton>
          </>
        }
      />
    </>
  );
}

/** The router's own refusals and a page that could not be fetched, put as Problems like everything else. */
function problemBehind(error: unknown): Problem {
  if (isRouteErrorResponse(error) && error.status === 404)
    return new Problem('not-found', 'There is nothing at this address.');
  if (error instanceof TypeError && /dynamically imported module|importing a module script/i.test(error.message))
    return new Problem('unreachable', 'This page could not be fetched.');
  return problemOf(error);
}
