import { launch } from '../../server/launch/terminal';
import { checkFormat, lint } from './static-checks';

/** `npm run lint`: the formatter's view, then the linter's. */
launch(async () => {
  const ends = [await checkFormat(), await lint()];
  process.exit(ends.every(({ code }) => code === 0) ? 0 : 1);
});
