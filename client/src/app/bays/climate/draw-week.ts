import type { EChartsCoreOption } from 'echarts/core';
import type { ClimateView } from '@common/contract';
import { formatDayAndTime } from '@common/time/format-instant';
import type { PlotInk } from '../../ui/plot/plot';

const MS_PER_MINUTE = 60_000;
const WEEK_MINUTES = 7 * 24 * 60;

/** The coming week's temperature as a solid step line and its humidity as a dashed one, each on its own side. */
export function drawWeek(week: ClimateView['week'], zone: string): (ink: PlotInk) => EChartsCoreOption {
  const start = week[0]?.from ?? 0;
  const until = start + WEEK_MINUTES;
  const line = (value: (step: ClimateView['week'][number]) => number): number[][] => [
    ...week.map((step) => [step.from * MS_PER_MINUTE, value(step)]),
    ...week.slice(-1).map((step) => [until * MS_PER_MINUTE, value(step)]),
  ];
  return (ink) => ({
    grid: { left: 48, right: 48, top: 26, bottom: 30 },
    xAxis: {
      type: 'value',
      min: start * MS_PER_MINUTE,
      max: until * MS_PER_MINUTE,
      interval: 24 * 60 * MS_PER_MINUTE,
      axisLabel: {
        color: ink.graphite,
        hideOverlap: true,
        formatter: (ms: number) =>
          formatDayAndTime(Math.round(ms / MS_PER_MINUTE), zone)
            .split(' ')
            .slice(0, 2)
            .join(' '),
      },
      axisLine: { lineStyle: { color: ink.graphite } },
      splitLine: { lineStyle: { color: ink.rule } },
    },
    yAxis: [
      {
        type: 'value',
        name: '°C',
        nameTextStyle: { color: ink.graphite },
        axisLabel: { color: ink.graphite },
        splitLine: { show: false },
      },
      {
        type: 'value',
        name: '% humidity',
        min: 0,
        max: 100,
        nameTextStyle: { color: ink.graphite },
        axisLabel: { color: ink.graphite },
        splitLine: { show: false },
      },
    ],
    series: [
      {
        type: 'line',
        step: 'end',
        showSymbol: false,
        lineStyle: { color: ink.oxide, width: 2.5 },
        data: line((step) => step.celsius),
      },
      {
        type: 'line',
        step: 'end',
        yAxisIndex: 1,
        showSymbol: false,
        lineStyle: { color: ink.silicone, width: 1.5, type: 'dashed' },
        data: line((step) => step.humidityPercent),
      },
    ],
  });
}
