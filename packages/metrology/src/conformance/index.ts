export { isUndetermined, undetermined } from '../result.ts';
export type { Undetermined } from '../result.ts';
export type { GeneralClass } from '../tables/iso2768-tables.ts';
export { bonusTolerance, virtualCondition } from './bonus.ts';
export type { Bonus, BonusInput, FeatureKind, MaterialModifier, VirtualCondition } from './bonus.ts';
export { compileLimits, SIMPLE_ACCEPTANCE } from './compile-limits.ts';
export type { Bound, CompiledLimits, DecisionRule, ScaledBounds, Zone } from './compile-limits.ts';
export { conformanceProbability, specificRisk } from './conformance-probability.ts';
export type {
  ConformanceProbability,
  MeasuredValue,
  NumericLimits,
  PriorKnowledge,
  SpecificRisk,
} from './conformance-probability.ts';
export { evaluateCompiled, evaluateReadings } from './evaluate-readings.ts';
export type { RefusedReading, SampleEvaluation } from './evaluate-readings.ts';
export { fitClassLimits, standardTolerance, standardToleranceFactor } from './fit-class.ts';
export type { FitClassLimits, ToleranceFactor } from './fit-class.ts';
export { fit, fitOfLimits } from './fits.ts';
export type { ClassFit, Fit } from './fits.ts';
export { generalTolerance } from './general-tolerances.ts';
export type { GeneralFeature, GeneralTolerance } from './general-tolerances.ts';
export { judgeGeometric } from './geometric.ts';
export type { CoordinateDeviations, GeometricInput, GeometricJudgement } from './geometric.ts';
export { globalRisk } from './global-risk.ts';
export type { GlobalRisk } from './global-risk.ts';
export { acceptanceBand, measurementCapabilityIndex } from './guard-band.ts';
export type { AcceptanceBand, MeasurementCapability } from './guard-band.ts';
export { acceptanceLimits, judgeCompiled, judgeDecimal, judgeReading } from './judge-reading.ts';
export type { ReadingJudgement } from './judge-reading.ts';
export { readLimits } from './limits.ts';
export type { Limits, ReadLimits } from './limits.ts';
export { comparePosition, positionBeyond, positionDiameter } from './position.ts';
export type { PositionDiameter } from './position.ts';
export { profileLimits, profileValue } from './profile-zone.ts';
export type { ProfileZone } from './profile-zone.ts';
export { toleranceLimits } from './tolerance-limits.ts';
export type { ToleranceLimits, ToleranceSpec } from './tolerance-limits.ts';
export { judgeAttribute, VERDICT_CODE, verdictOfCode, VERDICTS, worstVerdict } from './verdict.ts';
export type { AttributeJudgement, AttributeResult, Verdict } from './verdict.ts';
