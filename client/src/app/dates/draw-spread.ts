import type { EChartsCoreOption } from 'echarts/core';
import type { KeyDateForecastView } from '@common/contract';
import { formatDayAndTime } from '@common/time/format-instant';
import type { PlotInk } from '../ui/plot/plot';

const MS_PER_MINUTE = 60_000;
const TICKS = 4;

/**
 * The chance of being ready by each instant, as a rising curve, with the key date as an upright line. The line is cut where it
 * meets the curve by its label, so that the plot reads without colour.
 */
export function drawSpread(
  forecast: KeyDateForecastView,
  at: number,
  zone: string,
): (ink: PlotInk) => EChartsCoreOption {
  const { fan } = forecast;
  const first = Math.min(fan[0], at);
  const last = Math.max(fan[fan.length - 1], at);
  const room = Math.max(60, Math.round((last - first) * 0.04));
  return (ink) => ({
    grid: { left: 44, right: 16, top: 22, bottom: 30 },
    xAxis: {
      type: 'value',
      min: (first - room) * MS_PER_MINUTE,
      max: (last + room) * MS_PER_MINUTE,
      splitNumber: TICKS,
      axisLabel: {
        color: ink.graphite,
        hideOverlap: true,
        formatter: (ms: number) =>
          formatDayAndTime(Math.round(ms / MS_PER_MINUTE), zone)
            .split(' ')
            .slice(0, 3)
            .join(' '),
      },
      axisLine: { lineStyle: { color: ink.graphite } },
      splitLine: { show: false },
    },
    yAxis: {
      type: 'value',
      min: 0,
      max: 100,
      interval: 25,
      axisLabel: { color: ink.graphite, formatter: '{value} %' },
      splitLine: { lineStyle: { color: ink.rule } },
    },
    series: [
      {
        type: 'line',
        showSymbol: false,
        lineStyle: { color: ink.silicone, width: 2.5 },
        areaStyle: { color: ink.silicone, opacity: 0.14 },
        data: [
          [(first - room) * MS_PER_MINUTE, 0],
          ...fan.map((finish, step) => [finish * MS_PER_MINUTE, (100 * step) / (fan.length - 1)]),
          [(last + room) * MS_PER_MINUTE, 100],
        ],
        markLine: {
          symbol: 'none',
          silent: true,
          lineStyle: { color: ink.oxide, width: 2, type: 'solid' },
          label: { formatter: 'key date', color: ink.ink, position: 'end' },
          data: [{ xAxis: at * MS_PER_MINUTE }],
        },
      },
    ],
  });
}
