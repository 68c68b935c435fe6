import { useParams } from 'react-router-dom';
import { BuyingLine } from '../../features/buying-status/components/buying-line.tsx';

export function Component() {
  const { lineId = '' } = useParams();
  return <BuyingLine lineId={lineId} />;
}
