import { buildProblem, type SnapshotStage, type StudioSnapshot } from '@common/planning-input';
import type { Problem } from '@common/planning/problem/problem';
import { constantClimate } from '@common/dwell/climate';
import type { CalendarDay, Minute } from '@common/time/span';
import { buildDemoStudio } from './build-demo-studio';
import { demoCalendar } from './demo-calendar';
import type { DemoBay, DemoStage, DemoStudio } from './demo-studio-types';
import type { DemoMaterial } from './demo-material';

/** The demo as a problem for the engine, for benches and tests: on the morning of `today`, before anybody has come in. */
export function demoProblem(today: CalendarDay): Problem {
  const now = demoMorning(today);
  return buildProblem(demoSnapshot(buildDemoStudio(today)), { now, horizonEnd: null });
}

/** 07:30 on the first weekday from `today`. */
export function demoMorning(today: CalendarDay): Minute {
  return demoCalendar(today).at(0, '07:30');
}

/** The demo in the words that the server reads from its database. */
export function demoSnapshot(demo: DemoStudio): StudioSnapshot {
  const { roomTemperatureCelsius, roomHumidityPercent } = demo.settings;
  return {
    zone: demo.zone,
    settings: demo.settings,
    closures: demo.closures.map((closure) => closure.days),
    room: constantClimate({ celsius: roomTemperatureCelsius, humidityPercent: roomHumidityPercent }),
    makers: demo.makers.map((maker) => ({ ...maker, leave: maker.leave.map((leave) => leave.days) })),
    bays: demo.bays.map((bay) => ({ ...bay, isMould: bay.pieceId !== null, climate: climateOf(bay, demo) })),
    materials: demo.materials.map(materialOf),
    productions: demo.productions,
    pieces: demo.pieces,
    stages: demo.stages.map(stageOf),
    links: demo.links,
    purchases: demo.purchases,
    issued: null,
  };
}

function climateOf(bay: DemoBay, { settings }: DemoStudio): StudioSnapshot['bays'][number]['climate'] {
  if (bay.temperatureCelsius === null && bay.humidityPercent === null) {
    return null;
  }
  return constantClimate({
    celsius: bay.temperatureCelsius ?? settings.roomTemperatureCelsius,
    humidityPercent: bay.humidityPercent ?? settings.roomHumidityPercent,
  });
}

function materialOf(material: DemoMaterial): StudioSnapshot['materials'][number] {
  const { id, family, referenceCelsius, referenceHumidityPercent, dwells } = material;
  return {
    id,
    family,
    milestones: dwells.map(({ milestone, minutes, law, minimumCelsius, maximumCelsius }) => ({
      milestone,
      behaviour: { law, referenceCelsius, referenceHumidityPercent, minimumCelsius, maximumCelsius },
      minutes,
    })),
  };
}

function stageOf(stage: DemoStage): SnapshotStage {
  const begun = stage.state !== 'to-do';
  return { ...stage, makerIds: begun ? stage.makerIds : null, bayIds: begun ? stage.bayIds : null, pin: null };
}
