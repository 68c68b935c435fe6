export { attributeChart } from './attribute-chart.ts';
export type { AttributeChart, AttributeChartInput, AttributeChartKind } from './attribute-chart.ts';
export { chartConstants } from './constants.ts';
export type { ChartConstants } from './constants.ts';
export { c4, d2, d3 } from './single-constants.ts';
export { falseAlarmRate, WINDOW_PROBABILITY } from './false-alarms.ts';
export type { FalseAlarmRate } from './false-alarms.ts';
export { individualsChart } from './individuals-chart.ts';
export type { IndividualsChart, IndividualsChartInput } from './individuals-chart.ts';
export type { ChartPoint, ControlLimits } from './limits.ts';
export type { Phase } from './phase.ts';
export { NELSON_RULES, RULE_STATEMENTS, RULE_WINDOW, WESTERN_ELECTRIC_RULES } from './rules.ts';
export type { RunRule } from './rules.ts';
export { applyRunRules } from './run-rules.ts';
export type { RuleLines, Signal } from './run-rules.ts';
export type { ChartSeries, Statistic } from './series.ts';
export { subgroupChart } from './subgroup-chart.ts';
export type {
  FrozenProcess,
  SubgroupChart,
  SubgroupChartInput,
  SubgroupChartKind,
} from './subgroup-chart.ts';
export { subgroupSpread } from './subgroups.ts';
export type { SubgroupSpread } from './subgroups.ts';
export { cusumChart, ewmaChart } from './time-weighted-charts.ts';
export type { CusumChart, EwmaChart, TimeWeightedInput } from './time-weighted-charts.ts';
export { judgeProcess, POINTS_TO_SHOW_CONTROL } from './verdict.ts';
export type { ProcessState, ProcessVerdict } from './verdict.ts';
