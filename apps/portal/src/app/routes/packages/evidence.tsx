import { EvidencePage } from '../../../features/submissions/components/evidence-page.tsx';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return <PackageFrame>{(submission) => <EvidencePage submission={submission} />}</PackageFrame>;
}
