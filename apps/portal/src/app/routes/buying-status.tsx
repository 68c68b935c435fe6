import { BuyingStatusList } from '../../features/buying-status/components/buying-status-list.tsx';

export function Component() {
  return <BuyingStatusList />;
}
