import { PeoplePage } from '../../features/organisations/components/people-page.tsx';

export function Component() {
  return <PeoplePage />;
}
