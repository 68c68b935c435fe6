import { SuppliersPage } from '../../features/organisations/components/suppliers-page.tsx';

export function Component() {
  return <SuppliersPage />;
}
