import type { EChartsCoreOption } from 'echarts/core';
import { formatDayAndTime } from '@common/time/format-instant';
import type { PlotInk } from '../../ui/plot/plot';
import type { CurePoint } from './calculate-dwell';

const MS_PER_MINUTE = 60_000;
const TICKS = 3;

/** How far the dwell has come as a filled line, and the temperature as a dashed step line, each on its own side. */
export function drawCure(course: readonly CurePoint[], zone: string): (ink: PlotInk) => EChartsCoreOption {
  const line = (value: (point: CurePoint) => number): number[][] =>
    course.map((point) => [point.at * MS_PER_MINUTE, value(point)]);
  return (ink) => {
    const side = { type: 'value', nameTextStyle: { color: ink.graphite }, axisLabel: { color: ink.graphite } };
    return {
      grid: { left: 48, right: 48, top: 30, bottom: 30 },
      xAxis: {
        type: 'value',
        min: 'dataMin',
        max: 'dataMax',
        splitNumber: TICKS,
        axisLabel: {
          color: ink.graphite,
          hideOverlap: true,
          showMinLabel: false,
          showMaxLabel: false,
          formatter: (ms: number) => formatDayAndTime(Math.round(ms / MS_PER_MINUTE), zone),
        },
        axisLine: { lineStyle: { color: ink.graphite } },
        splitLine: { show: false },
      },
      yAxis: [
        { ...side, name: '% cured', min: 0, max: 100, interval: 25, splitLine: { lineStyle: { color: ink.rule } } },
        { ...side, name: '°C, dashed', scale: true, splitLine: { show: false } },
      ],
      series: [
        {
          type: 'line',
          showSymbol: false,
          lineStyle: { color: ink.silicone, width: 2.5 },
          areaStyle: { color: ink.silicone, opacity: 0.14 },
          data: line(({ percent }) => percent),
        },
        {
          type: 'line',
          step: 'end',
          yAxisIndex: 1,
          showSymbol: false,
          lineStyle: { color: ink.oxide, width: 1.5, type: 'dashed' },
          data: line(({ celsius }) => celsius),
        },
      ],
    };
  };
}
