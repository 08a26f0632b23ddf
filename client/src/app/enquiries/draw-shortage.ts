import type { EChartsCoreOption } from 'echarts/core';
import type { ShortRowView } from '@common/contract';
import { formatDay } from '@common/time/format-instant';
import type { PlotInk } from '../ui/plot/plot';

const MINUTES_PER_HOUR = 60;

/**
 * One craft or bay by week: what the plan takes, the enquiry in stripes upon it, and the capacity as a stepped line. Stripes and the
 * line tell them apart without colour; the table beside has the figures.
 */
export function drawShortage(row: ShortRowView, weeks: readonly string[]): (ink: PlotInk) => EChartsCoreOption {
  const hours = (minutes: readonly number[]): number[] => minutes.map((one) => Math.round(one / 6) / 10);
  return (ink) => ({
    grid: { left: 48, right: 12, top: 16, bottom: 30 },
    xAxis: {
      type: 'category',
      data: weeks.map((week) => formatDay(week).split(' ').slice(1).join(' ')),
      axisLabel: { color: ink.graphite, hideOverlap: true },
      axisLine: { lineStyle: { color: ink.graphite } },
    },
    yAxis: {
      type: 'value',
      axisLabel: { color: ink.graphite, formatter: '{value} h' },
      splitLine: { lineStyle: { color: ink.rule } },
      max: Math.ceil(tallest(row) / MINUTES_PER_HOUR),
    },
    series: [
      { type: 'bar', stack: 'load', itemStyle: { color: ink.graphite }, data: hours(row.takenMinutes) },
      {
        type: 'bar',
        stack: 'load',
        itemStyle: {
          color: ink.gesso,
          borderColor: ink.oxide,
          borderWidth: 1.5,
          decal: { symbol: 'rect', color: ink.oxide, dashArrayX: [1, 0], dashArrayY: [2, 4], rotation: -0.8 },
        },
        data: hours(row.askedMinutes),
      },
      {
        type: 'line',
        step: 'middle',
        showSymbol: false,
        lineStyle: { color: ink.ink, width: 2, type: 'dashed' },
        data: hours(row.capacityMinutes),
      },
    ],
  });
}

function tallest(row: ShortRowView): number {
  return row.capacityMinutes.reduce(
    (most, capacity, week) => Math.max(most, capacity, row.takenMinutes[week] + row.askedMinutes[week]),
    MINUTES_PER_HOUR,
  );
}
