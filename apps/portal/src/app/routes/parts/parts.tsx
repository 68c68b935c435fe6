import { PartsPage } from '../../../features/parts/components/parts-page.tsx';

export function Component() {
  return <PartsPage />;
}
