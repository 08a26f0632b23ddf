import { In, type EntityManager } from 'typeorm';
import type { LevelRun as LevelRunView } from '@common/contract';
import { LevelRun } from '@database/entities';

const UNDER_WAY = ['waiting', 'running'] as const;

/** Levellings, through one manager. */
export class LevelRepository {
  constructor(private readonly manager: EntityManager) {}

  byId(id: string): Promise<LevelRun | null> {
    return this.manager.findOneBy(LevelRun, { id });
  }

  underWay(): Promise<LevelRun[]> {
    return this.manager.findBy(LevelRun, { state: In(UNDER_WAY) });
  }

  async save(run: LevelRun): Promise<void> {
    const { base: _base, starter: _starter, ...row } = run;
    await this.manager.upsert(LevelRun, row, ['id']);
  }
}

/** Whether a levelling waits or runs. */
export function isUnderWay(run: LevelRun): boolean {
  return run.state === 'waiting' || run.state === 'running';
}

export function levelRunView(run: LevelRun): LevelRunView {
  return {
    id: run.id,
    state: run.state,
    mode: run.mode,
    revision: run.revision,
    startedAt: run.startedAt.toISOString(),
    seconds: run.seconds,
    schedules: run.schedules,
    objective: run.objective as LevelRunView['objective'],
    bound: run.bound,
    stop: run.stop,
    failure: run.failure,
  };
}
