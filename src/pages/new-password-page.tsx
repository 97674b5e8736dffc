import { useLoaderData, useNavigate } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { NewPasswordForm } from '../features/passwords/new-password-form.tsx';
import { passwordQueries } from '../features/passwords/passwords.queries.ts';
import { tokenInAddress } from '../lib/link-token.ts';
import { queryClient } from '../lib/query-client.ts';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

type NewPasswordPage = { token: string; email: string };

export async function loader(): Promise<NewPasswordPage> {
  const token = tokenInAddress();
  return { token, email: (await queryClient.fetchQuery(passwordQueries.reset(token))).email };
}

export function Component() {
  const { token, email } = useLoaderData<NewPasswordPage>();
  const navigate = useNavigate();
  const showToast = useToast();
  return (
    <div className="max-w-[26rem]">
      <PageHeader
        title="Set a new password"
        lede="Wherever you are signed in, you are signed out; then you sign in with the new one."
      />
      <NewPasswordForm
        token={token}
        email={email}
        onSet={() => {
          showToast('Your new password is set. Sign in with it.', 'held');
          void navigate(paths.signIn(), { replace: true });
        }}
      />
    </div>
  );
}
