/** A fault of a problem, found before any search; sentences are made from it by `explain/`. */
export type Fault =
  | { readonly kind: 'duplicate-id'; readonly what: NamedThing; readonly id: string }
  | { readonly kind: 'unknown-id'; readonly what: NamedThing; readonly id: string; readonly askedBy: string }
  | { readonly kind: 'not-an-integer'; readonly where: string }
  | { readonly kind: 'negative-amount'; readonly where: string }
  | { readonly kind: 'reversed-span'; readonly where: string }
  | { readonly kind: 'spans-out-of-order'; readonly where: string }
  | { readonly kind: 'profile-out-of-order'; readonly advanceId: string }
  | { readonly kind: 'crew-bounds'; readonly stageId: string; readonly craftId: string }
  | { readonly kind: 'craft-nobody-holds'; readonly craftId: string; readonly stageIds: readonly string[] }
  | {
      readonly kind: 'too-few-hands';
      readonly stageId: string;
      readonly craftId: string;
      readonly least: number;
      readonly holders: number;
    }
  | {
      readonly kind: 'session-too-long';
      readonly stageId: string;
      readonly minutes: number;
      readonly longestMinutes: number;
    }
  | { readonly kind: 'crew-on-clock'; readonly stageId: string }
  | { readonly kind: 'attended-by-nobody'; readonly stageId: string }
  | { readonly kind: 'no-bay'; readonly stageId: string; readonly place: number }
  | {
      readonly kind: 'bay-too-small';
      readonly stageId: string;
      readonly place: number;
      readonly units: number;
      readonly largest: number;
    }
  | { readonly kind: 'hold-not-let-go'; readonly stageId: string; readonly untilStageId: string }
  | {
      readonly kind: 'hold-asked-again';
      readonly stageId: string;
      readonly untilStageId: string;
      readonly bayId: string;
    }
  | {
      readonly kind: 'window-before-dwell';
      readonly stageId: string;
      readonly dwellMinutes: number;
      readonly windowMinutes: number;
    }
  | { readonly kind: 'gaps-reversed'; readonly fromStageId: string; readonly toStageId: string }
  | { readonly kind: 'link-cycle'; readonly stageIds: readonly string[]; readonly byMinutes: number }
  | { readonly kind: 'shifts-break-limits'; readonly makerId: string; readonly day: string };

/** What an id can name. */
export type NamedThing = 'maker' | 'craft' | 'bay' | 'stage' | 'key-date' | 'advance';

/** Faults that leave a problem without meaning; the engine refuses to start on one. The others it works around and reports. */
export const SENSELESS: ReadonlySet<Fault['kind']> = new Set([
  'duplicate-id',
  'unknown-id',
  'not-an-integer',
  'negative-amount',
  'reversed-span',
  'spans-out-of-order',
  'profile-out-of-order',
  'crew-bounds',
]);
