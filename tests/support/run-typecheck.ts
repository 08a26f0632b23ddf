import { launch, say } from '../../server/launch/terminal';
import { COMPILATIONS, typeCheck } from './static-checks';

/** `npm run typecheck`: every compilation, to the end, so that all that is wrong is seen at once. */
launch(async () => {
  let sound = true;
  for (const config of COMPILATIONS) {
    const { code } = await typeCheck(config);
    if (code !== 0) say(`${config} does not hold.`);
    sound &&= code === 0;
  }
  process.exit(sound ? 0 : 1);
});
