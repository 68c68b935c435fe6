import { PageHead } from '../../../components/ui/page-head.tsx';
import { NewRequest } from '../../../features/requests/components/new-request.tsx';

export function Component() {
  return (
    <>
      <PageHead title="New request" lead="Asks one supplier for the approval of one part revision." />
      <NewRequest />
    </>
  );
}
