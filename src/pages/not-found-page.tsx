import { paths } from '../app/paths.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export function NotFoundPage() {
  return (
    <>
      <PageHeader
        title="There is nothing at this address"
        lede="It may be mistyped, or what was here belongs to somebody else."
      />
      <LinkButton variant="primary" to={paths.start()}>
        Go to the start
      </LinkButton>
    </>
  );
}
