import { useLoaderData, useNavigate, useRevalidator } from 'react-router-dom';
import type { InvitationOffer } from '#shared/contracts/links.ts';
import type { SignedInPerson } from '#shared/contracts/sign-in.ts';
import { paths } from '../app/paths.ts';
import { AcceptForm } from '../features/invitations/accept-form.tsx';
import { invitationQueries } from '../features/invitations/invitations.queries.ts';
import { JoinButton } from '../features/invitations/join-button.tsx';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { SignInForm } from '../features/sign-in/sign-in-form.tsx';
import { SignOutHere } from '../features/sign-in/sign-out-here.tsx';
import { formatDateTime } from '../lib/format.ts';
import { tokenInAddress } from '../lib/link-token.ts';
import { queryClient } from '../lib/query-client.ts';
import { roleWords } from '../lib/role-words.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';

type InvitationPage = { token: string; offer: InvitationOffer; person: SignedInPerson | null };

export async function loader(): Promise<InvitationPage> {
  const token = tokenInAddress();
  const [offer, { person }] = await Promise.all([
    queryClient.fetchQuery(invitationQueries.offer(token)),
    queryClient.fetchQuery({ ...signInQueries.me(), staleTime: 0 }),
  ]);
  return { token, offer, person };
}

export function Component() {
  const page = useLoaderData<InvitationPage>();
  const { organisation, invitedBy, role, expiresAt } = page.offer;
  return (
    <div className="max-w-xl">
      <PageHeader
        title={`Join ${organisation}`}
        lede={`${invitedBy} invites you as ${roleWords[role].toLowerCase()}. The invitation is open until ${formatDateTime(expiresAt)}.`}
      />
      <Answer {...page} />
    </div>
  );
}

function Answer({ token, offer, person }: InvitationPage) {
  const navigate = useNavigate();
  const { revalidate } = useRevalidator();
  const { email, organisation, hasAccount } = offer;
  const goHome = (organisationId: string) => void navigate(paths.home(organisationId), { replace: true });
  const again = () => void revalidate();

  if (person !== null && person.email !== email)
    return (
      <div className="flex flex-col items-start gap-6">
        <Notice title={`You are signed in as ${person.email}.`}>
          The invitation is for {email}. Sign out here to accept it with that address.
        </Notice>
        <SignOutHere onSignedOut={again} />
      </div>
    );
  if (person !== null) return <JoinButton token={token} organisation={organisation} onJoined={goHome} />;
  if (hasAccount)
    return (
      <div className="flex max-w-[26rem] flex-col items-start gap-6">
        <p>This address has an account. Sign in with it; then you can join.</p>
        <div className="w-full">
          <SignInForm email={email} onSignedIn={again} />
        </div>
        <LinkButton variant="quiet" to={paths.forgottenPassword()}>
          Forgotten your password?
        </LinkButton>
      </div>
    );
  return (
    <div className="max-w-[26rem]">
      <AcceptForm token={token} email={email} onJoined={goHome} />
    </div>
  );
}
