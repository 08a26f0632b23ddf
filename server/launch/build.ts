import { buildApplication } from './build-application';
import { endErrands } from './child';
import { askedToEnd, launch } from './terminal';

/** `npm run build`: client and server into dist/, what has not changed left as it is. */
launch(async () => {
  const outcome = await Promise.race([buildApplication(), askedToEnd()]);
  if (outcome === undefined) process.exit(0);
  endErrands();
  process.exit(130);
});
