export { acceptanceProbability } from './acceptance-probability.ts';
export type { SamplingModel, SinglePlan } from './acceptance-probability.ts';
export * from './operating-characteristic.ts';
export * from './plan-design.ts';
export * from './single-plan-lookup.ts';
export {
  CODE_LETTERS,
  INSPECTION_LEVELS,
  REDUCED_SAMPLE_SIZES,
  SAMPLE_SIZES,
} from '../tables/iso2859-code-letters.ts';
export type { CodeLetter, InspectionLevel } from '../tables/iso2859-code-letters.ts';
export { AQL_VALUES } from '../tables/iso2859-single-plans.ts';
