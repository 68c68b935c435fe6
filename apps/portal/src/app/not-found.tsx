import { EmptyState } from '../components/ui/empty-state.tsx';
import { LinkButton } from '../components/ui/link-button.tsx';
import { PageHead } from '../components/ui/page-head.tsx';
import { paths } from '../lib/paths.ts';

/** The same words for what does not exist and for what belongs to others. */
export function NotFound() {
  return (
    <>
      <PageHead title="Not found" />
      <EmptyState
        title="There is nothing at this address for you"
        actions={<LinkButton to={paths.home}>Go to your desk</LinkButton>}
      >
        The address may be mistyped, or the page belongs to another organisation or another role. Whoever sent
        the link can tell which package it is about.
      </EmptyState>
    </>
  );
}
