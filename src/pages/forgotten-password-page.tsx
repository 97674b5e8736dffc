import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { paths } from '../app/paths.ts';
import { ResetRequestForm } from '../features/passwords/reset-request-form.tsx';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { queryClient } from '../lib/query-client.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export function loader() {
  return queryClient.ensureQueryData(signInQueries.me());
}

export function Component() {
  const [askedFor, setAskedFor] = useState<string | null>(null);
  const { mailbox } = useSuspenseQuery(signInQueries.me()).data;
  const back = { to: paths.signIn(), label: 'Sign in' };
  if (askedFor === null)
    return (
      <div className="max-w-[26rem]">
        <PageHeader
          title="Forgotten your password?"
          lede="A link by e-mail lets you set a new one. It works once, for one hour."
          back={back}
        />
        <ResetRequestForm onAsked={setAskedFor} />
      </div>
    );
  return (
    <div className="max-w-2xl">
      <PageHeader
        title="Look into your mail"
        lede={`If ${askedFor} has an account, a link is on its way there. It works once, for one hour.`}
        back={back}
      />
      <p className="pb-6 text-soft">
        Nothing comes? Look among unwanted mail, and check that this is the address you sign in with.
      </p>
      {mailbox ? (
        <LinkButton variant="primary" to={paths.mailbox()}>
          Open the mailbox of this machine
        </LinkButton>
      ) : null}
    </div>
  );
}
