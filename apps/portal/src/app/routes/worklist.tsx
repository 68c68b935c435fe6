import { LinkButton } from '../../components/ui/link-button.tsx';
import { PageHead } from '../../components/ui/page-head.tsx';
import { Worklist } from '../../features/submissions/components/worklist.tsx';
import { paths } from '../../lib/paths.ts';

export function Component() {
  return (
    <>
      <PageHead
        title="Worklist"
        lead="What you owe, by when, and what is wrong with it."
        actions={<LinkButton to={paths.requests}>Requests</LinkButton>}
      />
      <Worklist />
    </>
  );
}
