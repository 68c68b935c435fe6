import { LinkButton } from '../../components/ui/link-button.tsx';
import { PageHead } from '../../components/ui/page-head.tsx';
import { ReviewDesk } from '../../features/submissions/components/review-desk.tsx';
import { useMay } from '../../lib/session.ts';
import { paths } from '../../lib/paths.ts';

export function Component() {
  const mayAsk = useMay('request:write');
  const start = mayAsk && (
    <LinkButton to={paths.newRequest} weight="primary">
      New request
    </LinkButton>
  );
  return (
    <>
      <PageHead
        title="Review desk"
        lead="What is waiting for you, and what in it needs a human."
        actions={
          <>
            {start}
            <LinkButton to={paths.requests}>Requests</LinkButton>
          </>
        }
      />
      <ReviewDesk start={start} />
    </>
  );
}
