import { useLoaderData, useNavigate } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { FirstOwnerForm } from '../features/first-owner/first-owner-form.tsx';
import { tokenInAddress } from '../lib/link-token.ts';
import { PageHeader } from '../ui/page-header.tsx';

export function loader(): { token: string } {
  return { token: tokenInAddress() };
}

export function Component() {
  const { token } = useLoaderData<{ token: string }>();
  const navigate = useNavigate();
  return (
    <div className="max-w-xl">
      <PageHeader
        title="Begin with your organisation"
        lede="You become its owner: you invite the others and decide what each may do."
      />
      <FirstOwnerForm token={token} onCreated={() => void navigate(paths.start(), { replace: true })} />
    </div>
  );
}
