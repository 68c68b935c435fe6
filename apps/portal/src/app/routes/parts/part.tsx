import { useParams } from 'react-router-dom';
import { PartPage } from '../../../features/parts/components/part-page.tsx';

export function Component() {
  const { partId = '' } = useParams();
  return <PartPage partId={partId} />;
}
