import { useParams } from 'react-router-dom';
import { RequestPage } from '../../../features/requests/components/request-page.tsx';

export function Component() {
  const { requestId = '' } = useParams();
  return <RequestPage key={requestId} requestId={requestId} />;
}
