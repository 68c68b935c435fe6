import { GaugeList } from '../../features/gauges/components/gauge-list.tsx';

export function Component() {
  return <GaugeList />;
}
