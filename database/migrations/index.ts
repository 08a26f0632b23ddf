import { CrewAndClients1764547201000 } from './1764547201000-crew-and-clients';
import { AccountsAndAudit1764547202000 } from './1764547202000-accounts-and-audit';
import { WorkToBeDone1764547203000 } from './1764547203000-work-to-be-done';
import { StudioAndPlans1764547204000 } from './1764547204000-studio-and-plans';
import { FeedState1764547205000 } from './1764547205000-feed-state';
import { Forecast1764547206000 } from './1764547206000-forecast';
import { Rescues1764547207000 } from './1764547207000-rescues';
import { Climates1764547209000 } from './1764547209000-climates';

/** Every migration in its order, listed by hand: a glob would not survive bundling. */
export const migrations = [
  CrewAndClients1764547201000,
  AccountsAndAudit1764547202000,
  WorkToBeDone1764547203000,
  StudioAndPlans1764547204000,
  FeedState1764547205000,
  Forecast1764547206000,
  Rescues1764547207000,
  Climates1764547209000,
] as const;
