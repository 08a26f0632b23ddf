import { bayEndpoints } from './bays';
import { clientPageEndpoints } from './client-page';
import { climateEndpoints } from './climates';
import { crewEndpoints } from './crew';
import { daySheetEndpoints } from './day-sheet';
import { feedEndpoints } from './feeds';
import { forecastEndpoints } from './forecast';
import { libraryEndpoints } from './library';
import { pieceEndpoints } from './pieces';
import { planningEndpoints } from './planning';
import { productionEndpoints } from './productions';
import { promiseEndpoints } from './promises';
import { purchaseEndpoints } from './purchases';
import { rescueEndpoints } from './rescues';
import { sessionEndpoints } from './session';
import { stageImportEndpoints } from './stage-import';
import { studioEndpoints } from './studio';

/** Every route of the API by name: OpenAPI, the server's router, the client's calls and the permission matrix read this. */
export const endpoints = {
  ...sessionEndpoints,
  ...studioEndpoints,
  ...crewEndpoints,
  ...bayEndpoints,
  ...climateEndpoints,
  ...libraryEndpoints,
  ...productionEndpoints,
  ...pieceEndpoints,
  ...purchaseEndpoints,
  ...stageImportEndpoints,
  ...clientPageEndpoints,
  ...planningEndpoints,
  ...forecastEndpoints,
  ...rescueEndpoints,
  ...promiseEndpoints,
  ...daySheetEndpoints,
  ...feedEndpoints,
};
