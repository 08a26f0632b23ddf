import type { CraftView, LeaveView, MakerView } from '@common/contract';
import type { Craft, Leave, Maker } from '@database/entities';
import { isOffice, type Actor } from '../session';
import { patternOf } from '../storage/patterns';

export function craftView({ id, key, name, version }: Craft): CraftView {
  return { id, key, name, version };
}

export function leaveView({ id, makerId, days, note, version }: Leave): LeaveView {
  return { id, makerId, days, note, version };
}

/** A maker whole, as the office and the audit trail have it. */
export function makerView(maker: Maker): MakerView {
  return {
    id: maker.id,
    name: maker.name,
    initials: maker.initials,
    crafts: maker.crafts
      .map(({ craftId, pacePermille }) => ({ craftId, pacePermille }))
      .sort((a, b) => a.craftId.localeCompare(b.craftId)),
    patterns: [...maker.patterns].sort((a, b) => a.position - b.position).map(patternOf),
    hourCostMinor: maker.hourCostMinor,
    dayLimitMinutes: maker.dayLimitMinutes,
    weekLimitMinutes: maker.weekLimitMinutes,
    active: maker.active,
    note: maker.note,
    version: maker.version,
  };
}

/** A maker as `viewer` may see one: what an hour costs and what the office noted is the office's alone. */
export function makerViewFor(viewer: Actor, maker: Maker): MakerView {
  const view = makerView(maker);
  if (isOffice(viewer)) return view;
  const { hourCostMinor: _hourCostMinor, ...open } = view;
  return { ...open, note: '' };
}

/** Leave as `viewer` may see it: why others are away is not a maker's business. */
export function leaveViewFor(viewer: Actor, leave: Leave): LeaveView {
  const view = leaveView(leave);
  return isOffice(viewer) || viewer.makerId === leave.makerId ? view : { ...view, note: '' };
}
