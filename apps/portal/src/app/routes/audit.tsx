import { AuditPage } from '../../features/audit/components/audit-page.tsx';

export function Component() {
  return <AuditPage />;
}
