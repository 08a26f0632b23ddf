import type { Minute } from '../../time/span';

/** One way in which a stage stands otherwise in one plan than in another. */
export type PlanChange =
  | { readonly kind: 'added'; readonly stageId: string; readonly start: Minute }
  | { readonly kind: 'removed'; readonly stageId: string; readonly start: Minute }
  | { readonly kind: 'moved'; readonly stageId: string; readonly from: Minute; readonly to: Minute }
  | { readonly kind: 'reshaped'; readonly stageId: string; readonly fromEnd: Minute; readonly toEnd: Minute }
  | {
      readonly kind: 'crew';
      readonly stageId: string;
      readonly left: readonly string[];
      readonly joined: readonly string[];
    }
  | {
      readonly kind: 'bay';
      readonly stageId: string;
      readonly from: readonly string[];
      readonly to: readonly string[];
    };
