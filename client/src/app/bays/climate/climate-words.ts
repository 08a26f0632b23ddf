import type { ClimateView } from '@common/contract';
import { dewPoint } from '@common/dwell/humidity';

const DAMP_PERCENT = 85;
const DEW_MARGIN_CELSIUS = 3;

/** What to mind in a place's coming week; empty where there is nothing. */
export function climateWarnings(week: ClimateView['week']): string[] {
  const warnings: string[] = [];
  const dampest = Math.max(...week.map((step) => step.humidityPercent));
  if (dampest > DAMP_PERCENT) {
    warnings.push(
      `Up to ${dampest.toFixed(0)} % humidity: paint and varnish bloom above 85 %, and dry slowly. Warm or dry the air first.`,
    );
  }
  const close = week.some((step, k) => {
    const next = week.at(k + 1);
    // What was as cold as the air was before is met by the moister air that comes.
    return next !== undefined && step.celsius - dewPoint(next) < DEW_MARGIN_CELSIUS;
  });
  if (close) {
    warnings.push(
      'The dew point comes within 3 °C of what stood in the cold: water may settle on it. Let pieces warm up before they are coated.',
    );
  }
  return warnings;
}
