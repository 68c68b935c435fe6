import type { CheckInputs } from '../../evidence/check-inputs.ts';
import type { SignatureResponse } from '@trammel/shared/submissions';

/** Cells of the title block, the same as on the screen. */
export interface TitleFacts {
  readonly partNumber: string;
  readonly revision: string;
  readonly description: string;
  readonly request: string;
  readonly round: number;
  readonly state: string;
  readonly supplier: string;
  readonly site: string;
  readonly customer: string;
  readonly material: string;
  readonly units: string;
  readonly level: number;
  readonly due: string;
}

export interface DeviationLine {
  readonly number: number;
  readonly balloon: string;
  readonly range: string;
  readonly limits: string;
  readonly state: string;
  readonly decided: string;
  readonly cause: string;
  readonly containment: string;
  readonly streams: string;
}

/** What the customer has decided, as far as the supplier reads it too. */
export interface DispositionFacts {
  readonly limits: readonly string[];
  readonly conditions: readonly string[];
  readonly reasons: readonly string[];
  readonly comment: string;
}

/** Everything the documents of one round are made from; it travels to another thread, so it is data alone. */
export interface ReportScene {
  readonly title: TitleFacts;
  readonly reason: string;
  readonly decisionRule: string;
  readonly drawing: string;
  readonly declaration: string;
  readonly warrant: SignatureResponse | null;
  readonly disposition: SignatureResponse | null;
  readonly dispositionFacts: DispositionFacts | null;
  readonly deviations: readonly DeviationLine[];
  readonly findings: { readonly stops: number; readonly decides: number; readonly informs: number };
  readonly caution: string | null;
  readonly inputs: CheckInputs;
  /** Rows of the official check, as they were stored when the round was sealed. */
  readonly officialRows: string | null;
  readonly madeAt: string;
}
