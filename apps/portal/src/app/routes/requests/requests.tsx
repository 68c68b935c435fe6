import { LinkButton } from '../../../components/ui/link-button.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { RequestList } from '../../../features/requests/components/request-list.tsx';
import { paths } from '../../../lib/paths.ts';
import { useMay } from '../../../lib/session.ts';

export function Component() {
  const start = useMay('request:write') && (
    <LinkButton to={paths.newRequest} weight="primary">
      New request
    </LinkButton>
  );
  return (
    <>
      <PageHead
        title="Requests"
        lead="Which part revision was asked of whom, and where it stands."
        actions={start}
      />
      <RequestList start={start} />
    </>
  );
}
