/** A tolerance in the form in which the drawing states it; numbers are decimal text exactly as written. */
export type StatedTolerance =
  | { readonly form: 'symmetric'; readonly nominal: string; readonly tolerance: string }
  | { readonly form: 'deviations'; readonly nominal: string; readonly upper: string; readonly lower: string }
  | {
      readonly form: 'limits';
      readonly lower: string;
      readonly upper: string;
      readonly nominal: string | null;
    }
  | { readonly form: 'max'; readonly upper: string; readonly zeroBound: boolean }
  | { readonly form: 'min'; readonly lower: string }
  | { readonly form: 'fit'; readonly nominal: string; readonly fitClass: string }
  | {
      readonly form: 'general';
      readonly nominal: string;
      readonly generalClass: 'f' | 'm' | 'c' | 'v';
      readonly feature: 'linear' | 'radius-chamfer' | 'angular';
      /** Angles only: shorter leg in mm. */
      readonly shorterLeg?: string;
    }
  | { readonly form: 'none'; readonly nominal: string | null };
